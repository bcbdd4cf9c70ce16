import { curveWords } from '../cards/words';
import { Spots } from '../charts/spots';
import { formatNumber, formatPercent, formatSigned, formatSignedMoney, precisionOf } from '../format';
import type { ComparisonResult } from '../model/answer';
import { fundingChoices } from '../model/build';
import { nextId } from '../model/draft';
import { fundingInWords } from '../model/funding-words';
import { format } from '../model/view';
import { unitName } from '../quote/words';
import { built } from '../store/calculation';
import { deal, draft, editDraft } from '../store/session';
import { coreVersion } from '../store/signals';
import { useAnswer } from '../store/use-answer';
import { Elsewhere } from './elsewhere';

type Row = ComparisonResult['rows'][number];

/** The contract's limit of a name. */
const longestName = 200;

function meaning({ random, fitted }: Row): string {
  if (fitted) return 'fitted to a curve: that curve’s forward, whatever its volatility';
  return random ? 'its own expected factor: a matter of the model' : 'not random';
}

function Table({ rows, digits, stale }: { rows: readonly Row[]; digits: number; stale: boolean }) {
  const { request } = built.value;
  const { currency } = request.market.asset;
  return (
    <div class="table-frame" tabIndex={0} role="region" aria-label="The forward by funding" data-stale={stale}>
      <table class="table long-names">
        <thead>
          <tr>
            <th scope="col">Funding</th>
            <th scope="col" class="num">
              Fair
            </th>
            <th scope="col" class="num">
              Against the first
            </th>
            <th scope="col" class="num">
              On {formatNumber(request.inquiry.quantity)} {unitName(request)}
            </th>
            <th scope="col" class="num">
              At the average rate
            </th>
            <th scope="col" class="num">
              Gap
            </th>
            <th scope="col" class="num">
              Factor
            </th>
            <th scope="col" class="num">
              Its spread
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            <tr key={index}>
              <th scope="row">
                {row.name} <small>{meaning(row)}</small>
              </th>
              <td class="num strong">{formatNumber(row.fair, digits)}</td>
              <td class="num">{index === 0 ? '' : formatSigned(row.change, digits)}</td>
              <td class="num">{index === 0 ? '' : formatSignedMoney(row.onQuantity, currency)}</td>
              <td class="num">{row.random ? formatNumber(row.averageRateForward, digits) : ''}</td>
              <td class="num">{row.random ? formatSigned(row.gap, digits) : ''}</td>
              <td class="num">{formatNumber(row.expectedFactor, 6)}</td>
              <td class="num">{row.random && row.deviationLog !== null ? formatPercent(row.deviationLog, 2) : ''}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** The same inquiry under every kind of funding that is typed in. */
export function Comparison() {
  const { decimal, locale } = format.value;
  const { request } = built.value;
  const { leftOut, kept } = draft.value.analysis;
  const choices = fundingChoices(deal.value, kept, { sign: decimal, locale });
  const { curve } = deal.value.market.funding;
  const taken = choices.filter(({ key }, index) => index === 0 || !leftOut.includes(key));
  const { result, errors, stale } = useAnswer<ComparisonResult>(
    coreVersion.value === ''
      ? null
      : {
          format: 'forwright/1',
          task: 'compare',
          market: request.market,
          inquiry: request.inquiry,
          fundings: taken.map(({ name, curve }) => ({ name, curve })),
        },
  );
  const faultOf = (key: string): string | undefined => {
    const index = taken.findIndex((choice) => choice.key === key);
    return errors.find(({ at }) => at === `/fundings/${index}` || at.startsWith(`/fundings/${index}/`))?.message;
  };
  const digits = precisionOf(request.market.asset.tick, result?.rows[0]?.fair ?? 1).between + 2;
  return (
    <>
      <p>
        The same forward under every funding that is typed in on the sheet, in place of the one quoted. Spreads, income
        and fee stay. What differs between the rows is a matter of the model; what does not is not.
      </p>
      <fieldset class="checks">
        <legend class="label">Compare</legend>
        {choices.map(({ key, name }, index) => (
          <label class="check" key={key}>
            <input
              type="checkbox"
              checked={index === 0 || !leftOut.includes(key)}
              disabled={index === 0}
              onChange={(event) =>
                editDraft(
                  'analysis/leftOut',
                  event.currentTarget.checked ? leftOut.filter((other) => other !== key) : [...leftOut, key],
                )
              }
            />
            {name}
            {index === 0 && ', as quoted'}
            {faultOf(key) !== undefined && <span class="field-error">{faultOf(key)}</span>}
          </label>
        ))}
      </fieldset>
      <div class="row">
        <button
          type="button"
          class="plain"
          onClick={() => {
            const name = `${fundingInWords(curve)}: ${curveWords(curve)}`;
            editDraft('analysis/kept', [...kept, { id: nextId(kept), name: name.slice(0, longestName), curve }]);
          }}
        >
          Put this funding by
        </button>
        {kept.length === 0 && <span class="muted">to compare another of its kind with it</span>}
        {kept.map(({ id, name }) => (
          <button
            key={id}
            type="button"
            class="quiet"
            onClick={() =>
              editDraft(
                'analysis/kept',
                kept.filter((other) => other.id !== id),
              )
            }
          >
            Take out {name}
          </button>
        ))}
      </div>
      {choices.length === 1 && (
        <p class="muted">Only one kind of funding is typed in: each that you fill in under Funding joins it here.</p>
      )}
      {errors.every(({ at }) => !at.startsWith('/fundings/')) && <Elsewhere />}
      {result !== null && (
        <>
          <Spots
            name="Fair forward by funding"
            stale={stale}
            rows={result.rows.map(({ name, fair, random, averageRateForward }) => ({
              name,
              value: fair,
              other: random ? averageRateForward : null,
            }))}
            digits={digits}
            legend="Spot: the fair forward. Ring: at the average rate, where discounting is random."
          />
          <Table rows={result.rows} digits={digits} stale={stale} />
        </>
      )}
    </>
  );
}
