#pragma once

// Written by elementary_tables.py, which says how each constant is made. Do not edit by hand.
// clang-format off

#include <array>

/// The constants of the elementary functions.
namespace forwright::numeric::tables {

/// 64 / ln 2.
inline constexpr double stepsPerUnit = 0x1.71547652b82fep+6;

/// ln 2 / 64 to a multiple of 2^-42: 36 bits, so its product with up to 17 bits is exact.
inline constexpr double stepHigh = 0x1.62e42fefap-7;

/// ln 2 / 64 less stepHigh.
inline constexpr double stepLow = 0x1.cf79abc9e3b3ap-46;

/// 2^(i/64) as the sum of two doubles.
struct Root {
    double high;
    double low;
};
inline constexpr std::array<Root, 64> roots{{
    {0x1p+0, 0x0p+0}, {0x1.02c9a3e778061p+0, -0x1.19083535b085dp-56},
    {0x1.059b0d3158574p+0, 0x1.d73e2a475b465p-55}, {0x1.0874518759bc8p+0, 0x1.186be4bb284ffp-57},
    {0x1.0b5586cf9890fp+0, 0x1.8a62e4adc610bp-54}, {0x1.0e3ec32d3d1a2p+0, 0x1.03a1727c57b53p-59},
    {0x1.11301d0125b51p+0, -0x1.6c51039449b3ap-54}, {0x1.1429aaea92dep+0, -0x1.32fbf9af1369ep-54},
    {0x1.172b83c7d517bp+0, -0x1.19041b9d78a76p-55}, {0x1.1a35beb6fcb75p+0, 0x1.e5b4c7b4968e4p-55},
    {0x1.1d4873168b9aap+0, 0x1.e016e00a2643cp-54}, {0x1.2063b88628cd6p+0, 0x1.dc775814a8495p-55},
    {0x1.2387a6e756238p+0, 0x1.9b07eb6c70573p-54}, {0x1.26b4565e27cddp+0, 0x1.2bd339940e9d9p-55},
    {0x1.29e9df51fdee1p+0, 0x1.612e8afad1255p-55}, {0x1.2d285a6e4030bp+0, 0x1.0024754db41d5p-54},
    {0x1.306fe0a31b715p+0, 0x1.6f46ad23182e4p-55}, {0x1.33c08b26416ffp+0, 0x1.32721843659a6p-54},
    {0x1.371a7373aa9cbp+0, -0x1.63aeabf42eae2p-54}, {0x1.3a7db34e59ff7p+0, -0x1.5e436d661f5e3p-56},
    {0x1.3dea64c123422p+0, 0x1.ada0911f09ebcp-55}, {0x1.4160a21f72e2ap+0, -0x1.ef3691c309278p-58},
    {0x1.44e086061892dp+0, 0x1.89b7a04ef80dp-59}, {0x1.486a2b5c13cdp+0, 0x1.3c1a3b69062fp-56},
    {0x1.4bfdad5362a27p+0, 0x1.d4397afec42e2p-56}, {0x1.4f9b2769d2ca7p+0, -0x1.4b309d25957e3p-54},
    {0x1.5342b569d4f82p+0, -0x1.07abe1db13cadp-55}, {0x1.56f4736b527dap+0, 0x1.9bb2c011d93adp-54},
    {0x1.5ab07dd485429p+0, 0x1.6324c054647adp-54}, {0x1.5e76f15ad2148p+0, 0x1.ba6f93080e65ep-54},
    {0x1.6247eb03a5585p+0, -0x1.383c17e40b497p-54}, {0x1.6623882552225p+0, -0x1.bb60987591c34p-54},
    {0x1.6a09e667f3bcdp+0, -0x1.bdd3413b26456p-54}, {0x1.6dfb23c651a2fp+0, -0x1.bbe3a683c88abp-57},
    {0x1.71f75e8ec5f74p+0, -0x1.16e4786887a99p-55}, {0x1.75feb564267c9p+0, -0x1.0245957316dd3p-54},
    {0x1.7a11473eb0187p+0, -0x1.41577ee04992fp-55}, {0x1.7e2f336cf4e62p+0, 0x1.05d02ba15797ep-56},
    {0x1.82589994cce13p+0, -0x1.d4c1dd41532d8p-54}, {0x1.868d99b4492edp+0, -0x1.fc6f89bd4f6bap-54},
    {0x1.8ace5422aa0dbp+0, 0x1.6e9f156864b27p-54}, {0x1.8f1ae99157736p+0, 0x1.5cc13a2e3976cp-55},
    {0x1.93737b0cdc5e5p+0, -0x1.75fc781b57ebcp-57}, {0x1.97d829fde4e5p+0, -0x1.d185b7c1b85d1p-54},
    {0x1.9c49182a3f09p+0, 0x1.c7c46b071f2bep-56}, {0x1.a0c667b5de565p+0, -0x1.359495d1cd533p-54},
    {0x1.a5503b23e255dp+0, -0x1.d2f6edb8d41e1p-54}, {0x1.a9e6b5579fdbfp+0, 0x1.0fac90ef7fd31p-54},
    {0x1.ae89f995ad3adp+0, 0x1.7a1cd345dcc81p-54}, {0x1.b33a2b84f15fbp+0, -0x1.2805e3084d708p-57},
    {0x1.b7f76f2fb5e47p+0, -0x1.5584f7e54ac3bp-56}, {0x1.bcc1e904bc1d2p+0, 0x1.23dd07a2d9e84p-55},
    {0x1.c199bdd85529cp+0, 0x1.11065895048ddp-55}, {0x1.c67f12e57d14bp+0, 0x1.2884dff483cadp-54},
    {0x1.cb720dcef9069p+0, 0x1.503cbd1e949dbp-56}, {0x1.d072d4a07897cp+0, -0x1.cbc3743797a9cp-54},
    {0x1.d5818dcfba487p+0, 0x1.2ed02d75b3707p-55}, {0x1.da9e603db3285p+0, 0x1.c2300696db532p-54},
    {0x1.dfc97337b9b5fp+0, -0x1.1a5cd4f184b5cp-54}, {0x1.e502ee78b3ff6p+0, 0x1.39e8980a9cc8fp-55},
    {0x1.ea4afa2a490dap+0, -0x1.e9c23179c2893p-54}, {0x1.efa1bee615a27p+0, 0x1.dc7f486a4b6bp-54},
    {0x1.f50765b6e454p+0, 0x1.9d3e12dd8a18bp-54}, {0x1.fa7c1819e90d8p+0, 0x1.74853f3a5931ep-55},
}};

/// (e^r - 1 - r) / r^2 for |r| <= ln 2 / 128.
/// Greatest error of the polynomial itself: 1.5e-13.
inline constexpr std::array<double, 4> exponentialTail{
    0x1.ffffffffff57fp-2, 0x1.5555555555255p-3, 0x1.55556b3307a7cp-5, 0x1.11111d8fc0064p-7,
};

/// (e^x - 1 - x) / x^2 for |x| <= 1/8.
/// Greatest error of the polynomial itself: 2.3e-18.
inline constexpr std::array<double, 9> exponentialTailWide{
    0x1p-1, 0x1.5555555555553p-3, 0x1.5555555555555p-5, 0x1.11111111175f6p-7, 0x1.6c16c16c1af5ap-10,
    0x1.a01a0034e2fafp-13, 0x1.a01a00adf7125p-16, 0x1.71fc7e8d7f45ap-19, 0x1.27f928d5df576p-22,
};

/// For each of the 128 steps of the significand m in [11/16, 11/8): a multiple of 2^-9 near 1/m, and minus
/// its logarithm as a multiple of 2^-42 and a rest. Next to 1, on both sides, the inverse is 1 itself.
/// Over all steps m * inverse - 1 lies in [-0.00455, 0.00781].
struct Inverse {
    double inverse;
    double logHigh;
    double logLow;
};
inline constexpr std::array<Inverse, 128> inverses{{
    {0x1.738p+0, -0x1.7d4eeef5efp-2, 0x1.c9018f8f27d8fp-45},
    {0x1.71p+0, -0x1.7664e1239ep-2, 0x1.0c4fb6aeb27afp-44},
    {0x1.6fp+0, -0x1.70d42e2789p-2, -0x1.1aead337ee287p-45},
    {0x1.6dp+0, -0x1.6b3bb22359p-2, -0x1.0f6257a933268p-44},
    {0x1.6bp+0, -0x1.659b57303ep-2, -0x1.f281db0af8efcp-46},
    {0x1.69p+0, -0x1.5ff3070a79p-2, -0x1.e9e439f105039p-45},
    {0x1.67p+0, -0x1.5a42ab0f4dp-2, 0x1.e63af2df7ba69p-50},
    {0x1.65p+0, -0x1.548a2c3addp-2, -0x1.3167e63081cf7p-45},
    {0x1.63p+0, -0x1.4ec97326p-2, -0x1.34d7aaf04d104p-45},
    {0x1.618p+0, -0x1.4a7373cedp-2, 0x1.9a234ebf35449p-44},
    {0x1.5f8p+0, -0x1.44a41b463cp-2, -0x1.1ee28f37cf612p-44},
    {0x1.5d8p+0, -0x1.3ecc460ef6p-2, 0x1.6028627c1300fp-47},
    {0x1.5b8p+0, -0x1.38ebdb38edp-2, -0x1.90582e67d4cap-45},
    {0x1.5ap+0, -0x1.347dd9a988p-2, 0x1.5594dd4c58092p-45},
    {0x1.58p+0, -0x1.2e8e2bae12p-2, 0x1.67b1e99b72bd8p-45},
    {0x1.56p+0, -0x1.2895a13de8p-2, -0x1.a8d7ad24c13fp-44},
    {0x1.548p+0, -0x1.241558bfd1p-2, -0x1.00fff3228fcadp-44},
    {0x1.528p+0, -0x1.1e0d0c3371p-2, -0x1.af8f2a9b0d4ap-44},
    {0x1.51p+0, -0x1.1980d2dd42p-2, -0x1.b7b3a7a361c9ap-45},
    {0x1.4fp+0, -0x1.136870293bp-2, 0x1.d3e8499d67123p-44},
    {0x1.4d8p+0, -0x1.0ed005f658p-2, 0x1.2dc75285aa803p-45},
    {0x1.4cp+0, -0x1.0a324e2739p-2, -0x1.c6bee7ef4030ep-47},
    {0x1.4ap+0, -0x1.0402594b4dp-2, -0x1.036b89ef42d7fp-48},
    {0x1.488p+0, -0x1.feb0233e6p-3, -0x1.f316e32d5e8c7p-45},
    {0x1.47p+0, -0x1.f550a564b8p-3, 0x1.323e3a09202fep-45},
    {0x1.45p+0, -0x1.e8c0252aa6p-3, 0x1.6805b80e8e6ffp-45},
    {0x1.438p+0, -0x1.df46c0c722p-3, -0x1.a5e82b0b79039p-44},
    {0x1.42p+0, -0x1.d5c216b4fcp-3, 0x1.1ba91bbca681bp-45},
    {0x1.408p+0, -0x1.cc320c0176p-3, -0x1.409039a653794p-45},
    {0x1.3fp+0, -0x1.c2968558c2p-3, 0x1.cfd73dee38a4p-45},
    {0x1.3d8p+0, -0x1.b8ef67042p-3, -0x1.87533321788ep-44},
    {0x1.3cp+0, -0x1.af3c94e80cp-3, 0x1.a4e633fcd9066p-52},
    {0x1.3a8p+0, -0x1.a57df28244p-3, -0x1.b99c8ca1d9abbp-44},
    {0x1.39p+0, -0x1.9bb362e7ep-3, 0x1.1f2a8a1ce0ffcp-45},
    {0x1.378p+0, -0x1.91dcc8c34p-3, -0x1.7bc6abddeff46p-44},
    {0x1.36p+0, -0x1.87fa06520cp-3, -0x1.22120401202fcp-44},
    {0x1.348p+0, -0x1.7e0afd630cp-3, -0x1.39e7c1d8f1034p-46},
    {0x1.33p+0, -0x1.740f8f5404p-3, 0x1.0b66c99018aa1p-44},
    {0x1.318p+0, -0x1.6a079d0f7ap-3, -0x1.5a3f8448d14f5p-44},
    {0x1.3p+0, -0x1.5ff3070a7ap-3, 0x1.8586f183bebf2p-44},
    {0x1.2e8p+0, -0x1.55d1ad4232p-3, -0x1.add94dda647e8p-44},
    {0x1.2d8p+0, -0x1.4f099f4a24p-3, 0x1.e9bf2fafeaf27p-44},
    {0x1.2cp+0, -0x1.44d2b6ccb8p-3, 0x1.70cc16135783cp-46},
    {0x1.2a8p+0, -0x1.3a8eb2d31ap-3, -0x1.bafb77d5d503ep-46},
    {0x1.29p+0, -0x1.303d718e48p-3, 0x1.680b5ce3ecb05p-50},
    {0x1.28p+0, -0x1.29552f82p-3, 0x1.5b967f4471dfcp-44},
    {0x1.268p+0, -0x1.1eed90e2dcp-3, -0x1.615637097648fp-46},
    {0x1.25p+0, -0x1.1478584674p-3, -0x1.563451027c75p-46},
    {0x1.24p+0, -0x1.0d77e7cd08p-3, -0x1.cb2cd2ee2f482p-44},
    {0x1.228p+0, -0x1.02ebb42bf4p-3, 0x1.5a8fa5ce00e5dp-46},
    {0x1.218p+0, -0x1.f7b79fec38p-4, 0x1.10987e897ed01p-47},
    {0x1.2p+0, -0x1.e27076e2bp-4, 0x1.a342c2af0003cp-45},
    {0x1.1fp+0, -0x1.d4313d66ccp-4, 0x1.9454379135713p-45},
    {0x1.1d8p+0, -0x1.beba818148p-4, 0x1.89b78b6df1f57p-44},
    {0x1.1c8p+0, -0x1.b05b49bee4p-4, -0x1.ff22c18f84a5ep-47},
    {0x1.1bp+0, -0x1.9ab4246204p-4, 0x1.8a64826787061p-45},
    {0x1.1ap+0, -0x1.8c345d6318p-4, -0x1.b20f5acb42a66p-44},
    {0x1.188p+0, -0x1.765bf23a6cp-4, 0x1.ecbc035c4256ap-48},
    {0x1.178p+0, -0x1.67bb0726ecp-4, -0x1.f724b69ef5912p-49},
    {0x1.168p+0, -0x1.590cafdfp-4, -0x1.c284f5722abaap-44},
    {0x1.15p+0, -0x1.42edcbea64p-4, -0x1.bc0eeea7c9acdp-46},
    {0x1.14p+0, -0x1.341d7961bcp-4, -0x1.1d0929983761p-44},
    {0x1.13p+0, -0x1.253f62f0ap-4, -0x1.416f8fb69a701p-44},
    {0x1.118p+0, -0x1.0ed839b554p-4, 0x1.901f46d48abb4p-44},
    {0x1.108p+0, -0x1.ffae9119b8p-5, -0x1.303374262c554p-45},
    {0x1.0f8p+0, -0x1.e19070c278p-5, 0x1.fea4664629e86p-45},
    {0x1.0e8p+0, -0x1.c355dd092p-5, -0x1.f2ccc9abf8388p-45},
    {0x1.0dp+0, -0x1.95c830ec9p-5, 0x1.c148297c5feb8p-45},
    {0x1.0cp+0, -0x1.77458f633p-5, 0x1.181dce586af09p-44},
    {0x1.0bp+0, -0x1.58a5bafc9p-5, 0x1.b2b739570ad39p-45},
    {0x1.0ap+0, -0x1.39e87b9fe8p-5, -0x1.eafd480ad9015p-44},
    {0x1.09p+0, -0x1.1b0d98924p-5, 0x1.3401e9ae889bbp-44},
    {0x1.078p+0, -0x1.d91a66c54p-6, -0x1.e61f1658cfb9ap-45},
    {0x1.068p+0, -0x1.9ace7551dp-6, 0x1.d75d97ec7c41p-45},
    {0x1.058p+0, -0x1.5c45a51b9p-6, 0x1.63bb6216d87d8p-45},
    {0x1.048p+0, -0x1.1d7f7eb9fp-6, 0x1.4193a83fcc7a6p-46},
    {0x1.038p+0, -0x1.bcf712c74p-7, -0x1.c25e097bd9771p-46},
    {0x1.028p+0, -0x1.3e7295d26p-7, 0x1.609c1ff29a114p-45},
    {0x1.018p+0, -0x1.7ee11ebd8p-8, -0x1.749d3c2d23a07p-47}, {0x1p+0, 0x0p+0, 0x0p+0},
    {0x1p+0, 0x0p+0, 0x0p+0}, {0x1.fap-1, 0x1.82448a388p-7, 0x1.4554412c584ep-44},
    {0x1.f6p-1, 0x1.432a92598p-6, 0x1.98139928637fep-47},
    {0x1.f2p-1, 0x1.c63d2ec15p-6, -0x1.5439ce030a687p-44},
    {0x1.efp-1, 0x1.149e3e4008p-5, -0x1.2b98a9a4168fdp-44},
    {0x1.ebp-1, 0x1.5715c4c04p-5, -0x1.8888ddfc47628p-44},
    {0x1.e7p-1, 0x1.9a187b574p-5, -0x1.0c22e4ec4d90dp-44},
    {0x1.e4p-1, 0x1.ccb73cddd8p-5, 0x1.965c36e09f5fep-44},
    {0x1.ep-1, 0x1.08598b59e4p-4, -0x1.7e5dd7009902cp-46},
    {0x1.ddp-1, 0x1.2207b5c784p-4, 0x1.49d8cfc10c7bfp-44},
    {0x1.d9p-1, 0x1.4485e03dbcp-4, 0x1.fad46e8d26ab7p-44},
    {0x1.d6p-1, 0x1.5e95a4d978p-4, 0x1.1cb7ce1d17171p-44},
    {0x1.d2p-1, 0x1.8197e2f41p-4, -0x1.c0fe460d20041p-44},
    {0x1.cfp-1, 0x1.9c0c32d4d4p-4, -0x1.ab7c09e838668p-44},
    {0x1.ccp-1, 0x1.b6ac88dad4p-4, 0x1.b1bdff50225c7p-44},
    {0x1.c9p-1, 0x1.d179788218p-4, 0x1.36433b5efbeedp-44},
    {0x1.c6p-1, 0x1.ec739830ap-4, 0x1.11fcba80cdd1p-44},
    {0x1.c2p-1, 0x1.08598b59e4p-3, -0x1.7e5dd7009902cp-45},
    {0x1.bfp-1, 0x1.160c8024b2p-3, 0x1.ec2d2a9009e3dp-45},
    {0x1.bcp-1, 0x1.23d712a49cp-3, 0x1.00d238fd3df5cp-46},
    {0x1.b9p-1, 0x1.31b994d3a4p-3, 0x1.f098ee3a5081p-44},
    {0x1.b6p-1, 0x1.3fb45a5992p-3, 0x1.19713c0cae559p-44},
    {0x1.b3p-1, 0x1.4dc7b897bcp-3, 0x1.c79b60ae1ff0fp-47},
    {0x1.b1p-1, 0x1.5737cc9018p-3, 0x1.9baa7a6b887f6p-44},
    {0x1.aep-1, 0x1.6574ebe8c2p-3, -0x1.98c1d34f0f462p-44},
    {0x1.abp-1, 0x1.73cb9074fep-3, -0x1.d66a90d0005a6p-44},
    {0x1.a8p-1, 0x1.823c16551ap-3, 0x1.e0ddb9a631e83p-46},
    {0x1.a5p-1, 0x1.90c6db9fccp-3, -0x1.935f57718d7cap-46},
    {0x1.a3p-1, 0x1.9a8778debap-3, 0x1.470fa3efec39p-44},
    {0x1.ap-1, 0x1.a93ed3c8aep-3, -0x1.8724350562169p-45},
    {0x1.9dp-1, 0x1.b811730b82p-3, 0x1.e90683b9cd768p-46},
    {0x1.9bp-1, 0x1.c2028ab18p-3, -0x1.92e0ee55c7ac6p-45},
    {0x1.98p-1, 0x1.d1037f2656p-3, -0x1.84a7e75b6f6e4p-47},
    {0x1.96p-1, 0x1.db13db0d48p-3, 0x1.2806a847527e6p-44},
    {0x1.93p-1, 0x1.ea4449f04ap-3, 0x1.5e91663732a36p-44},
    {0x1.91p-1, 0x1.f474b134ep-3, -0x1.bae49f1df7b5ep-44},
    {0x1.8ep-1, 0x1.01eae5626cp-2, 0x1.a43dcfade85aep-44},
    {0x1.8cp-1, 0x1.07138604d6p-2, -0x1.e76324e912b17p-44},
    {0x1.8ap-1, 0x1.0c42d67616p-2, 0x1.7188b163ceae9p-45},
    {0x1.87p-1, 0x1.14167ef367p-2, 0x1.e0c07824daaf5p-44},
    {0x1.85p-1, 0x1.1956d3b9bcp-2, 0x1.7d2f73ad1aa14p-45},
    {0x1.83p-1, 0x1.1e9e16788ap-2, -0x1.82eaed3c8b65ep-44},
    {0x1.8p-1, 0x1.269621134ep-2, -0x1.1b61f10522625p-44},
    {0x1.7ep-1, 0x1.2bef07cdc9p-2, 0x1.a9cfa4a5004f4p-45},
    {0x1.7cp-1, 0x1.314f1e1d36p-2, -0x1.8e27ad3213cb8p-45},
    {0x1.7ap-1, 0x1.36b6776be1p-2, 0x1.16ecdb0f177c8p-46},
    {0x1.78p-1, 0x1.3c25277333p-2, 0x1.83b54b606bd5cp-46},
    {0x1.75p-1, 0x1.44591e053ap-2, -0x1.6e95892923d88p-47},
}};

/// ln 2 to a multiple of 2^-42: its product with any exponent is exact.
inline constexpr double ln2High = 0x1.62e42fefa38p-1;

/// ln 2 less ln2High.
inline constexpr double ln2Low = 0x1.ef35793c7673p-45;

/// (ln(1 + r) - r) / r^2 for -0.0053 <= r <= 2^-7.
/// Greatest error of the polynomial itself: 3.2e-16.
inline constexpr std::array<double, 6> logarithmTail{
    -0x1.0000000000001p-1, 0x1.55555555542d4p-2, -0x1.fffffffe00cffp-3, 0x1.99999e54fbef9p-3,
    -0x1.55580195f13bp-3, 0x1.22a9f48fe0a1ep-3,
};

/// 2 / pi.
inline constexpr double quartersPerRadian = 0x1.45f306dc9c883p-1;

/// pi / 2 to a multiple of 2^-32: exact when multiplied by up to 20 bits.
inline constexpr double quarterFirst = 0x1.921fb544p+0;

/// The next bits of pi / 2, to a multiple of 2^-65: exact likewise.
inline constexpr double quarterSecond = 0x1.0b4611a6p-34;

/// The rest of pi / 2.
inline constexpr double quarterThird = 0x1.3198a2e037073p-69;

/// (sin r / r - 1) / r^2 as a polynomial in r^2, for |r| <= pi / 4.
/// Greatest error of the polynomial itself: 3.2e-17.
inline constexpr std::array<double, 6> sineTail{
    -0x1.5555555555555p-3, 0x1.1111111110bb2p-7, -0x1.a01a019e83aa2p-13, 0x1.71de37968909p-19,
    -0x1.ae600b01a40ccp-26, 0x1.5e0b1995f429ap-33,
};

/// (cos r - 1 + r^2 / 2) / r^4 as a polynomial in r^2, for |r| <= pi / 4.
/// Greatest error of the polynomial itself: 2.3e-18.
inline constexpr std::array<double, 6> cosineTail{
    0x1.5555555555555p-5, -0x1.6c16c16c16967p-10, 0x1.a01a019f4eafap-16, -0x1.27e4fa17d9864p-22,
    0x1.1eeb68e8b2372p-29, -0x1.907da304ce77bp-37,
};

/// An angle as the sum of two doubles.
struct Angle {
    double high;
    double low;
};
/// pi.
inline constexpr Angle halfTurn{0x1.921fb54442d18p+1, 0x1.1a62633145c07p-53};

/// pi / 2.
inline constexpr Angle quarterTurn{0x1.921fb54442d18p+0, 0x1.1a62633145c07p-54};

/// The angles whose tangents are i / 32.
inline constexpr std::array<Angle, 33> angles{{
    {0x0p+0, 0x0p+0}, {0x1.ffd55bba97625p-6, -0x1.5ec431444912cp-60},
    {0x1.ff55bb72cfdeap-5, -0x1.c934d86d23f1dp-60}, {0x1.7ee182602f10fp-4, -0x1.cfb654c0c3d98p-58},
    {0x1.fd5ba9aac2f6ep-4, -0x1.cd37686760c17p-59}, {0x1.3d6eee8c6626cp-3, 0x1.61a3b0ce9281bp-57},
    {0x1.7b97b4bce5b02p-3, 0x1.347b0b4f881cap-58}, {0x1.b90d7529260a2p-3, 0x1.17b10d2e0e5abp-61},
    {0x1.f5b75f92c80ddp-3, 0x1.8ab6e3cf7afbdp-57}, {0x1.18bf5a30bf178p-2, 0x1.30ca4748b1bf9p-57},
    {0x1.362773707ebccp-2, -0x1.963a544b672d8p-57}, {0x1.530ad9951cd4ap-2, -0x1.2566480884082p-57},
    {0x1.6f61941e4def1p-2, -0x1.c63aae6f6e918p-56}, {0x1.8b24d394a1b25p-2, 0x1.b6d0ba3748fa8p-56},
    {0x1.a64eec3cc23fdp-2, -0x1.24dec1b50b7ffp-56}, {0x1.c0db4c94ec9fp-2, -0x1.cc1ce70934c34p-56},
    {0x1.dac670561bb4fp-2, 0x1.a2b7f222f65e2p-56}, {0x1.f40dd0b541418p-2, -0x1.a3992dc382a23p-57},
    {0x1.0657e94db30dp-1, -0x1.d5b495f6349e6p-56}, {0x1.1255d9bfbd2a9p-1, -0x1.2bdaee1c0ee35p-58},
    {0x1.1e00babdefeb4p-1, -0x1.928df287a668fp-58}, {0x1.2958e59308e31p-1, -0x1.09e73b0c6c087p-56},
    {0x1.345f01cce37bbp-1, 0x1.1021137c71102p-55}, {0x1.3f13fb89e96f4p-1, 0x1.ecf8b492644fp-56},
    {0x1.4978fa3269ee1p-1, 0x1.2419a87f2a458p-56}, {0x1.538f57b89061fp-1, -0x1.1bb74abda520cp-55},
    {0x1.5d58987169b18p-1, 0x1.0028e4bc5e7cap-57}, {0x1.66d663923e087p-1, -0x1.6ea6febe8bbbap-56},
    {0x1.700a7c5784634p-1, -0x1.8c34d25aadef6p-56}, {0x1.78f6bbd5d315ep-1, 0x1.406a08980374p-55},
    {0x1.819d0b7158a4dp-1, -0x1.bf76229d3b917p-56}, {0x1.89ff5ff57f1f8p-1, -0x1.55b9a5e177a1bp-55},
    {0x1.921fb54442d18p-1, 0x1.1a62633145c07p-55},
}};

/// (atan d / d - 1) / d^2 as a polynomial in d^2, for |d| <= 1/64.
/// Greatest error of the polynomial itself: 1.9e-17.
inline constexpr std::array<double, 4> arcTangentTail{
    -0x1.5555555555555p-2, 0x1.9999999996b13p-3, -0x1.2492483bee407p-3, 0x1.c6ede986726aep-4,
};

} // namespace forwright::numeric::tables
