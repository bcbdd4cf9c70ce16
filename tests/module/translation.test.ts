// Every operation that the translation into plain script knows, against WebAssembly itself: one function an operation,
// over values at the edges of its operands and over seeded random ones, to the bit.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { calculations, comparisons, loads, saturating, stores } from '../../web/src/core/plain/operations';
import { translate } from '../../web/src/core/plain/translate';
import {
  laneCalculations,
  laneLoads,
  laneStores,
  vectorCalculations,
  vectorLoads,
} from '../../web/src/core/plain/vectors';

type Kind = 'i32' | 'i64' | 'f32' | 'f64' | 'v128';
type Exported = Record<string, ((...values: unknown[]) => unknown) & { buffer: ArrayBuffer }>;

const seed = 20_261_201;
const codes: Record<Kind, number> = { i32: 0x7f, i64: 0x7e, f32: 0x7d, f64: 0x7c, v128: 0x7b };
const sizes: Record<Kind, number> = { i32: 4, i64: 8, f32: 4, f64: 8, v128: 16 };
const constantLoads: Record<Kind, number[]> = {
  i32: [0x28],
  i64: [0x29],
  f32: [0x2a],
  f64: [0x2b],
  v128: [0xfd, 0],
};
const plainStores: Record<Kind, number[]> = {
  i32: [0x36],
  i64: [0x37],
  f32: [0x38],
  f64: [0x39],
  v128: [0xfd, 11],
};

// ---- a module with one function that loads its operands, does one thing and stores what comes out --------------

function leb(value: number): number[] {
  const bytes: number[] = [];
  for (let rest = value; ; rest >>>= 7) {
    if (rest < 128) return [...bytes, rest];
    bytes.push((rest & 127) | 128);
  }
}
const list = (items: readonly (readonly number[])[]) => [...leb(items.length), ...items.flat()];
const section = (id: number, bytes: readonly number[]) => [id, ...leb(bytes.length), ...bytes];
const named = (name: string) => [name.length, ...Buffer.from(name)];

/** The operation's own code is between the loads of its operands, from 16 on, and the store of its result at 0. */
function moduleOf(
  operands: readonly Kind[],
  operation: readonly number[],
  result: Kind | undefined,
): Uint8Array<ArrayBuffer> {
  const loading = operands.flatMap((kind, at) => [0x41, ...leb(16 + 16 * at), ...constantLoads[kind], 0, 0]);
  const storing = result === undefined ? [] : [...plainStores[result], 0, 0];
  const body = [
    ...list([]),
    0x41,
    0,
    ...loading,
    ...operation,
    ...storing,
    ...(result === undefined ? [0x1a] : []),
    0x0b,
  ];
  return Uint8Array.from([
    ...[0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
    ...section(1, list([[0x60, 0, 0]])),
    ...section(3, list([[0]])),
    ...section(5, list([[0, 1]])),
    ...section(
      7,
      list([
        [...named('run'), 0, 0],
        [...named('memory'), 2, 0],
      ]),
    ),
    ...section(10, list([[...leb(body.length), ...body]])),
  ]);
}

async function bothOf(binary: Uint8Array<ArrayBuffer>): Promise<{ real: Exported; plain: Exported }> {
  const { instance } = await WebAssembly.instantiate(binary);
  const make = new Function(`return ${translate(binary)}`)() as (given: Uint8Array, imports: object) => Exported;
  return { real: instance.exports as unknown as Exported, plain: make(binary, {}) };
}

/** Runs both on the same bytes; gives the memory that each leaves, or that it refused. */
function left({ run, memory }: Exported, given: Uint8Array): Uint8Array | 'refused' {
  const bytes = new Uint8Array(memory!.buffer);
  bytes.fill(0, 0, 256);
  bytes.set(given, 16);
  try {
    run!();
  } catch {
    return 'refused';
  }
  return bytes.slice(0, 256);
}

// ---- values ----------------------------------------------------------------------------------------------------

const bytesOf = (write: (view: DataView) => void, size: number) => {
  const view = new DataView(new ArrayBuffer(size));
  write(view);
  return [...new Uint8Array(view.buffer)];
};
const whole = fc.oneof(
  fc.constantFrom(0, 1, -1, 2, 31, 32, 33, 255, 256, 65535, 2147483647, -2147483648, -2147483647),
  fc.integer({ min: -2147483648, max: 2147483647 }),
);
const longWhole = fc.oneof(
  fc.constantFrom(0n, 1n, -1n, 63n, 64n, 65n, 4294967295n, -4294967296n, 2n ** 53n + 1n, 2n ** 63n - 1n, -(2n ** 63n)),
  fc.bigInt({ min: -(2n ** 63n), max: 2n ** 63n - 1n }),
);
// The bits of what is no number are nobody's promise, so it is left out where bits are compared.
const real = fc.oneof(
  fc.constantFrom(
    0,
    -0,
    0.5,
    -0.5,
    1.5,
    2.5,
    -2.5,
    1e300,
    -1e-300,
    5e-324,
    Infinity,
    -Infinity,
    2147483647.5,
    4294967295,
    2 ** 63,
  ),
  fc.double({ noNaN: true }),
  fc.integer({ min: -10, max: 10 }).map((halves) => halves / 2),
);
const operandBytes: Record<Kind, fc.Arbitrary<number[]>> = {
  i32: whole.map((value) => bytesOf((view) => view.setInt32(0, value, true), 4)),
  i64: longWhole.map((value) => bytesOf((view) => view.setBigInt64(0, value, true), 8)),
  f32: real.map((value) => bytesOf((view) => view.setFloat32(0, value, true), 4)),
  f64: real.map((value) => bytesOf((view) => view.setFloat64(0, value, true), 8)),
  v128: fc.oneof(
    fc
      .tuple(real, real)
      .map(([a, b]) => bytesOf((view) => (view.setFloat64(0, a, true), view.setFloat64(8, b, true)), 16)),
    fc
      .tuple(longWhole, longWhole)
      .map(([a, b]) => bytesOf((view) => (view.setBigInt64(0, a, true), view.setBigInt64(8, b, true)), 16)),
    fc.array(whole, { minLength: 4, maxLength: 4 }).map((words) => [...new Uint8Array(Int32Array.from(words).buffer)]),
  ),
};

/** Two results are alike when their bytes are, or when both are no number in the same lane. */
function alike(one: Uint8Array | 'refused', other: Uint8Array | 'refused', result: Kind | undefined): boolean {
  // Script computes on where WebAssembly refuses: the core never comes to that.
  if (one === 'refused' || other === 'refused') return one === 'refused';
  if (Buffer.compare(one, other) === 0) return true;
  const step = result === 'f32' ? 4 : 8;
  const isReal = (bytes: Uint8Array, at: number) => {
    const view = new DataView(bytes.buffer, at);
    return !Number.isNaN(step === 4 ? view.getFloat32(0, true) : view.getFloat64(0, true));
  };
  if (result !== 'f32' && result !== 'f64' && result !== 'v128') return false;
  for (let at = 0; at < one.length; at += step) {
    const same = Buffer.compare(one.subarray(at, at + step), other.subarray(at, at + step)) === 0;
    if (!same && (isReal(one, at) || isReal(other, at))) return false;
  }
  return true;
}

async function expectAlike(
  operands: readonly Kind[],
  operation: readonly number[],
  result: Kind | undefined,
): Promise<void> {
  const { real: module, plain } = await bothOf(moduleOf(operands, operation, result));
  const values = fc.tuple(
    ...operands.map((kind) =>
      operandBytes[kind].map((bytes) => [...bytes, ...Array<number>(16 - sizes[kind]).fill(0)]),
    ),
  );
  fc.assert(
    fc.property(values, (bytes) => {
      const given = Uint8Array.from(bytes.flat());
      const [expected, actual] = [left(module, given), left(plain, given)];
      if (!alike(expected, actual, result)) {
        expect({ given: Buffer.from(given).toString('hex'), left: String(actual) }).toEqual({
          left: String(expected),
        });
      }
    }),
    { seed, numRuns: 400 },
  );
}

// ---- every operation -------------------------------------------------------------------------------------------

const operandCount = (template: string) => (/\bC\b/.test(template) ? 3 : /\bB\b/.test(template) ? 2 : 1);

/** What kind of number an operation of WebAssembly 1.0 takes and gives, by its code. */
function kindsOf(code: number): { takes: Kind; gives: Kind } {
  const kinds: Kind[] = ['i32', 'i64', 'f32', 'f64'];
  const from = (firsts: number[]) => kinds[firsts.filter((first) => first <= code).length - 1]!;
  if (code <= 0x66) return { takes: from([0x45, 0x50, 0x5b, 0x61]), gives: 'i32' };
  if (code <= 0xa6) {
    const kind = from([0x67, 0x79, 0x8b, 0x99]);
    return { takes: kind, gives: kind };
  }
  const conversions: Record<number, [Kind, Kind]> = {
    0xa7: ['i64', 'i32'],
    0xa8: ['f32', 'i32'],
    0xa9: ['f32', 'i32'],
    0xaa: ['f64', 'i32'],
    0xab: ['f64', 'i32'],
    0xac: ['i32', 'i64'],
    0xad: ['i32', 'i64'],
    0xae: ['f32', 'i64'],
    0xaf: ['f32', 'i64'],
    0xb0: ['f64', 'i64'],
    0xb1: ['f64', 'i64'],
    0xb2: ['i32', 'f32'],
    0xb3: ['i32', 'f32'],
    0xb6: ['f64', 'f32'],
    0xb7: ['i32', 'f64'],
    0xb8: ['i32', 'f64'],
    0xb9: ['i64', 'f64'],
    0xba: ['i64', 'f64'],
    0xbb: ['f32', 'f64'],
    0xbc: ['f32', 'i32'],
    0xbd: ['f64', 'i64'],
    0xbe: ['i32', 'f32'],
    0xbf: ['i64', 'f64'],
    0xc0: ['i32', 'i32'],
    0xc1: ['i32', 'i32'],
    0xc2: ['i64', 'i64'],
    0xc3: ['i64', 'i64'],
    0xc4: ['i64', 'i64'],
  };
  const [takes, gives] = conversions[code]!;
  return { takes, gives };
}

describe('plain script computes as WebAssembly does', () => {
  test.each(
    Object.entries({ ...comparisons, ...calculations }).map(([code, template]) => ({
      code: Number(code),
      template,
    })),
  )('$code: $template', async ({ code, template }) => {
    const { takes, gives } = kindsOf(code);
    await expectAlike(Array<Kind>(operandCount(template)).fill(takes), [code], gives);
  });

  test.each(Object.keys(saturating).map(Number))('0xfc %i', async (code) => {
    await expectAlike([code % 4 < 2 ? 'f32' : 'f64'], [0xfc, code], code < 4 ? 'i32' : 'i64');
  });

  test.each(Object.entries(vectorCalculations).map(([code, template]) => ({ code: Number(code), template })))(
    '0xfd $code: $template',
    async ({ code, template }) => {
      const splats: Record<number, Kind> = { 15: 'i32', 16: 'i32', 17: 'i32', 18: 'i64', 20: 'f64' };
      const shifts = [107, 108, 109, 139, 140, 141, 171, 172, 173, 203, 204, 205];
      const tests = [83, 99, 100, 131, 132, 163, 164, 195, 196];
      const operands = Array<Kind>(operandCount(template)).fill('v128');
      if (splats[code]) operands[0] = splats[code];
      if (shifts.includes(code)) operands[1] = 'i32';
      await expectAlike(operands, [0xfd, ...leb(code)], tests.includes(code) ? 'i32' : 'v128');
    },
  );

  test.each(Object.keys(laneCalculations).flatMap((code) => [0, 1].map((lane) => ({ code: Number(code), lane }))))(
    '0xfd $code, lane $lane',
    async ({ code, lane }) => {
      const scalar: Kind = code <= 28 ? 'i32' : code <= 30 ? 'i64' : 'f64';
      const replaces = [23, 26, 28, 30, 34].includes(code);
      await expectAlike(replaces ? ['v128', scalar] : ['v128'], [0xfd, code, lane], replaces ? 'v128' : scalar);
    },
  );

  test('shuffles bytes', async () => {
    const from = [0, 17, 2, 19, 31, 30, 29, 28, 4, 4, 15, 16, 8, 9, 24, 25];
    await expectAlike(['v128', 'v128'], [0xfd, 13, ...from], 'v128');
  });

  test.each(Object.keys(loads).flatMap((code) => [0, 1, 5].map((offset) => ({ code: Number(code), offset }))))(
    'load $code at $offset',
    async ({ code, offset }) => {
      const kinds: Kind[] = ['i32', 'i64', 'f32', 'f64'];
      const gives: Kind = code < 0x2c ? kinds[code - 0x28]! : code < 0x30 ? 'i32' : 'i64';
      await expectAlike(['v128'], [0x1a, 0x41, 16, code, 0, offset], gives);
    },
  );

  test.each(Object.keys(stores).map(Number))('store %i', async (code) => {
    const kinds: Kind[] = ['i32', 'i64', 'f32', 'f64', 'i32', 'i32', 'i64', 'i64', 'i64'];
    const kind = kinds[code - 0x36]!;
    const operation = [code, 0, 100, 0x41, 0];
    await expectAlike([kind], operation, undefined);
  });

  test.each(Object.keys(vectorLoads).map(Number))('0xfd load %i', async (code) => {
    await expectAlike(['v128'], [0x1a, 0x41, 17, 0xfd, code, 0, 3], 'v128');
  });

  test.each(Object.keys(laneLoads).map(Number))('0xfd lane load %i', async (code) => {
    const loadVector = [0x41, 32, 0xfd, 0, 0, 0];
    await expectAlike(['v128', 'v128'], [0x1a, 0x1a, 0x41, 17, ...loadVector, 0xfd, code, 0, 3, 1], 'v128');
  });

  test.each([11, ...Object.keys(laneStores).map(Number)])('0xfd store %i', async (code) => {
    await expectAlike(['v128'], [0xfd, code, 0, 101, ...(code === 11 ? [] : [1]), 0x41, 0], undefined);
  });

  test('refuses by name what it does not know', () => {
    expect(() => translate(moduleOf(['v128', 'v128'], [0xfd, 130, 1], 'v128'))).toThrow('0xfd 130');
  });
});

describe('what binds operations together', () => {
  /** i32 → i32, one function: the text of WebAssembly stands beside each. */
  const functionOf = (locals: number, code: number[]): Uint8Array<ArrayBuffer> => {
    const body = [...list(locals > 0 ? [[locals, codes.i32]] : []), ...code, 0x0b];
    return Uint8Array.from([
      ...[0x00, 0x61, 0x73, 0x6d, 1, 0, 0, 0],
      ...section(1, list([[0x60, ...list([[codes.i32]]), ...list([[codes.i32]])]])),
      ...section(3, list([[0]])),
      ...section(5, list([[1, 1, 3]])),
      ...section(6, list([[codes.i32, 1, 0x41, 7, 0x0b]])),
      ...section(7, list([[...named('run'), 0, 0]])),
      ...section(10, list([[...leb(body.length), ...body]])),
    ]);
  };
  const get = (local: number) => [0x20, local];
  const set = (local: number) => [0x21, local];
  const tee = (local: number) => [0x22, local];
  const [one, add, multiply] = [[0x41, 1], [0x6a], [0x6c]];

  test.each([
    ['a local read before it is set', 0, [...get(0), ...get(0), ...one, ...add, ...set(0), ...get(0), ...multiply]],
    ['a global read before it is set', 0, [0x23, 0, ...get(0), 0x24, 0, 0x23, 0, 0x41, 10, ...multiply, ...add]],
    [
      'memory read before it is written',
      0,
      [0x41, 0, 0x28, 2, 0, 0x41, 0, ...get(0), 0x36, 2, 0, 0x41, 0, 0x28, 2, 0, 0x6b],
    ],
    [
      'a block that gives a value',
      0,
      [0x02, 0x7f, 0x41, 5, ...get(0), 0x0d, 0, 0x1a, 0x41, 6, 0x0b, ...get(0), ...add],
    ],
    [
      'a branch out of two blocks with a value',
      0,
      [0x02, 0x7f, 0x02, 0x40, 0x41, 8, ...get(0), 0x0d, 1, 0x1a, 0x0b, 0x41, 9, 0x0b],
    ],
    ['if and else that give a value', 0, [...get(0), 0x04, 0x7f, 0x41, 3, 0x05, 0x41, 4, 0x0b]],
    ['a value under an if', 0, [...get(0), ...get(0), 0x04, 0x40, 0x41, 9, ...set(0), 0x0b, ...get(0), ...add]],
    [
      'a loop',
      1,
      [
        0x03,
        0x40,
        ...get(1),
        ...get(0),
        ...add,
        ...set(1),
        ...get(0),
        ...one,
        0x6b,
        ...tee(0),
        0x41,
        0,
        0x4a,
        0x0d,
        0,
        0x0b,
        ...get(1),
      ],
    ],
    [
      'a loop that gives a value',
      1,
      [0x03, 0x7f, ...get(1), ...one, ...add, ...tee(1), ...get(0), 0x48, 0x0d, 0, ...get(1), 0x0b],
    ],
    [
      'a table of branches',
      0,
      [
        0x02,
        0x40,
        0x02,
        0x40,
        0x02,
        0x40,
        ...get(0),
        0x0e,
        3,
        0,
        1,
        1,
        2,
        0x0b,
        0x41,
        10,
        0x0f,
        0x0b,
        0x41,
        20,
        0x0f,
        0x0b,
        0x41,
        30,
      ],
    ],
    [
      'what cannot be reached',
      0,
      [0x02, 0x40, 0x0c, 0, 0x02, 0x40, 0x41, 1, 0x04, 0x40, 0x05, 0x0b, 0x0b, 0x00, 0x0b, ...get(0)],
    ],
    ['a return from a block', 0, [0x02, 0x40, ...get(0), 0x45, 0x0d, 0, 0x41, 1, 0x0f, 0x0b, 0x41, 2]],
    ['a value returned on a condition', 0, [0x41, 11, ...get(0), 0x0d, 0, 0x1a, 0x41, 12]],
    ['a choice', 0, [0x41, 1, 0x41, 2, ...get(0), 0x1b]],
    [
      'calling itself',
      0,
      [...get(0), 0x41, 0, 0x4c, 0x04, 0x40, 0x41, 0, 0x0f, 0x0b, ...get(0), ...get(0), ...one, 0x6b, 0x10, 0, ...add],
    ],
    ['memory that grows, and no further than it may', 0, [...get(0), 0x40, 0, 0x3f, 0, 0x41, 10, ...multiply, ...add]],
  ] as [string, number, number[]][])('%s', async (_, locals, code) => {
    for (const given of [0, 1, 2, 3, 7, -1]) {
      const { real: module, plain } = await bothOf(functionOf(locals, code));
      expect(plain.run!(given), `of ${given}`).toBe(module.run!(given));
    }
  });
});
