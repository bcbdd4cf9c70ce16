import { Outcomes } from '../charts/outcomes';
import { Plot } from '../charts/plot';
import { bindDraft } from '../fields/binding';
import { Field, type FieldProps } from '../fields/field';
import {
  formatDate,
  formatMoney,
  formatNumber,
  formatPercent,
  formatSignedMoney,
  formatSignificant,
  precisionOf,
} from '../format';
import type { Parsed } from '../input/parsed';
import { readNumber, type NumberKind } from '../input/quantities';
import type { HedgeCoverResult } from '../model/answer';
import { format } from '../model/view';
import type { Fault } from '../model/view';
import { unitName } from '../quote/words';
import { built } from '../store/calculation';
import { coreVersion } from '../store/signals';
import { useAnswer } from '../store/use-answer';
import { Elsewhere } from './elsewhere';

const members = {
  growth: { kind: 'percent', label: 'The price grows at', unit: '% a year' },
  volatility: { kind: 'percent', label: 'Volatility', unit: '% a year' },
  share: { kind: 'percent', label: 'Hedged', unit: '% of it' },
  loading: { kind: 'plain', label: 'Loading', unit: 'a deviation' },
} as const satisfies Readonly<Record<string, Pick<FieldProps, 'label' | 'unit'> & { readonly kind: NumberKind }>>;
type Member = keyof typeof members;

/** Every twentieth, for the picture. */
const shares = Array.from({ length: 21 }, (_, index) => index / 20);

/** Which of the two worlds the price lives in, in plain words. */
function world(share: number): string {
  if (share === 1)
    return 'All of it is hedged: the price is the forward that the hedge makes, under the pricing measure. What anybody thinks of the asset’s growth or of its risk is not in it.';
  if (share === 0)
    return 'Nothing is hedged: this is an insurer’s price, under the real-world measure. It is the price that is expected at maturity with a charge for the risk, and it is as good as the growth that is assumed.';
  return 'A part is hedged: the price stands between the two worlds. The hedged part is priced by its hedge, under the pricing measure; the rest by what is expected under the real-world measure, with a charge for its risk.';
}

/** So many outcomes in a hundred. */
function odds(probability: number): string {
  return `${formatSignificant(probability * 100, 2)} in 100`;
}

function Figures({ result, digits }: { result: HedgeCoverResult; digits: number }) {
  const { request } = built.value;
  const { currency } = request.market.asset;
  const { onQuantity } = result;
  const all = `on ${formatNumber(request.inquiry.quantity)} ${unitName(request)}`;
  const money = (value: number | null): string => (value === null ? '–' : formatSignedMoney(value, currency));
  type Figure = readonly [name: string, value: string, more: string];
  const aUnit: readonly Figure[] = [
    ['We sell at', formatNumber(result.sell, digits), 'the client buys'],
    ['We buy at', result.buy === null ? 'no price above zero' : formatNumber(result.buy, digits), 'the client sells'],
    ['Fair, all hedged', formatNumber(result.fair, digits), 'the forward'],
    ['Expected at maturity', formatNumber(result.expected, digits), 'at the growth assumed'],
    ['Deviation of our result', formatNumber(result.deviation, digits), 'a unit'],
  ];
  const onAll: readonly Figure[] = [
    ['Selling, over fair', money(onQuantity.sell), all],
    ['Buying, below fair', money(onQuantity.buy), all],
    ['Deviation', formatMoney(onQuantity.deviation, currency), all],
    ['We lose, selling', odds(result.lossProbability), 'at the growth assumed'],
    [
      'We lose, buying',
      result.buyLossProbability === null ? '–' : odds(result.buyLossProbability),
      'at the growth assumed',
    ],
  ];
  return (
    <>
      {[aUnit, onAll].map((figures) => (
        <dl class="facts" key={figures === aUnit ? 'a unit' : 'on all'}>
          {figures.map(([name, value, more]) => (
            <div key={name}>
              <dt>{name}</dt>
              <dd>
                <b class="num">{value}</b> <small>{more}</small>
              </dd>
            </div>
          ))}
        </dl>
      ))}
    </>
  );
}

/** The price by the share that can be hedged, from the insurer's to the hedger's. */
export function Cover() {
  const { decimal } = format.value;
  const { request } = built.value;
  const bindings = {
    growth: bindDraft('analysis/cover/growth'),
    volatility: bindDraft('analysis/cover/volatility'),
    share: bindDraft('analysis/cover/share'),
    loading: bindDraft('analysis/cover/loading'),
  };
  const read = (member: Member): Parsed<number> => readNumber(bindings[member].text, members[member].kind, decimal);
  const names = Object.keys(members) as Member[];
  const typed = Object.fromEntries(
    names.flatMap((member) => {
      const parsed = read(member);
      return parsed.ok ? [[member, parsed.value]] : [];
    }),
  ) as Partial<Record<Member, number>>;
  const { maturity, roll } = request.inquiry;
  const ready = names.every((member) => member in typed) && coreVersion.value !== '';
  const { result, errors, stale } = useAnswer<HedgeCoverResult>(
    ready
      ? {
          format: 'forwright/1',
          task: 'hedge-cover',
          market: request.market,
          maturity,
          ...(roll === undefined ? {} : { roll }),
          ...typed,
          quantity: request.inquiry.quantity,
          shares,
        }
      : null,
  );
  const wrongOf = (member: Member): Fault | null => {
    const parsed = read(member);
    if (bindings[member].text.trim() !== '' && !parsed.ok)
      return { at: `/${member}`, code: parsed.code, message: parsed.message };
    return errors.find(({ at }) => at === `/${member}`) ?? null;
  };
  const digits = precisionOf(request.market.asset.tick, result?.fair ?? 1).between;
  const price = (value: number): string => formatNumber(value, digits);
  return (
    <>
      <p>
        What a forward costs when only a share of it can be hedged. Selling it, we gain the price agreed over the fair
        forward on what is hedged, and carry the asset’s own path on what is not.
      </p>
      <div class="field-row cover-fields">
        {names.map((member) => (
          <Field
            key={member}
            {...members[member]}
            path={bindings[member].path}
            binding={bindings[member]}
            wrong={wrongOf(member)}
          />
        ))}
      </div>
      <Elsewhere />
      {!ready && coreVersion.value !== '' && (
        <p class="muted">Type the growth, the volatility, the share that is hedged and the loading.</p>
      )}
      {errors
        .filter(
          ({ at }) => !names.some((member) => at === `/${member}`) && !at.startsWith('/market') && at !== '/maturity',
        )
        .map((fault) => (
          <p class="notice wrong" key={fault.at}>
            {fault.message}
          </p>
        ))}
      {result !== null && (
        <div class="random" data-stale={stale}>
          <p>
            <b>{world(result.share)}</b>
          </p>
          <Figures result={result} digits={digits} />
          <div class="pictures">
            <Plot
              name={`Price to ${formatDate(result.maturity)} by the share hedged`}
              axis="number"
              xs={(result.rows ?? []).map(({ share }) => share)}
              xName="Hedged"
              xText={(share) => formatPercent(share, 0)}
              yText={price}
              rest={(result.rows ?? []).findIndex(({ share }) => share >= result.share)}
              lines={[
                { name: 'we sell at', look: 'main', values: (result.rows ?? []).map(({ sell }) => sell) },
                { name: 'we buy at', look: 'dashed', values: (result.rows ?? []).map(({ buy }) => buy) },
              ]}
              levels={[{ name: 'fair, all hedged', value: result.fair }]}
              legend="Line: we sell. Dashed: we buy. Level: the fair forward, where both meet when all is hedged."
            />
            {result.deviation > 0 &&
              [
                { side: 'sell', quantiles: result.quantiles },
                { side: 'buy', quantiles: result.buyQuantiles },
              ]
                .filter(({ quantiles }) => quantiles.length > 0)
                .map(({ side, quantiles }) => (
                  <Outcomes
                    key={side}
                    name={`Our result a unit when we ${side}, where outcomes lie`}
                    what="Result a unit"
                    quantiles={quantiles.map(({ probability, result: value }) => ({ probability, value }))}
                    marks={[{ name: 'nothing gained or lost', value: 0 }]}
                    digits={digits}
                    fineDigits={digits}
                  />
                ))}
          </div>
          <p class="cautions">
            The unhedged part can lose far more than is charged for it: growth and volatility are assumptions, not
            facts, and losses beyond one outcome in a hundred are not drawn.
          </p>
        </div>
      )}
    </>
  );
}
