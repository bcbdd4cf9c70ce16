import { useId, useState } from 'preact/hooks';
import { Plot } from '../charts/plot';
import {
  formatBasisPoints,
  formatDate,
  formatNumber,
  formatPercent,
  formatSigned,
  formatSignificant,
  minus,
  precisionOf,
  timeOf,
} from '../format';
import type { CurveResult } from '../model/answer';
import { built } from '../store/calculation';
import { coreVersion } from '../store/signals';
import { useAnswer } from '../store/use-answer';

type Which = CurveResult['which'];
const names: Readonly<Record<Which, string>> = {
  funding: 'Funding',
  discount: 'Discounting',
  base: 'Base currency',
  yield: 'Yield',
};
const horizons = ['3M', '6M', '1Y', '2Y', '5Y', '10Y', '30Y'];
const instrumentNames = { deposit: 'Deposit', fra: 'FRA', 'overnight-swap': 'Swap' } as const;

/** Differences smaller than this are rounding, and said to be none. */
const rounding = 1e-12;

function Instruments({ result }: { readonly result: CurveResult }) {
  return (
    <div class="table-frame" tabIndex={0} role="region" aria-label="Instruments and what the curve makes of them">
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Instrument</th>
            <th scope="col">From</th>
            <th scope="col">To</th>
            <th scope="col" class="num">
              Quoted
            </th>
            <th scope="col" class="num">
              From the curve
            </th>
            <th scope="col" class="num">
              Difference
            </th>
          </tr>
        </thead>
        <tbody>
          {result.instruments.map(({ at, type, start, end, quote, repriced, difference }) => (
            <tr key={at}>
              <th scope="row">{instrumentNames[type]}</th>
              <td class="date">{formatDate(start)}</td>
              <td class="date">{formatDate(end)}</td>
              <td class="num">{formatPercent(quote, 4)}</td>
              <td class="num">{formatPercent(repriced, 4)}</td>
              <td class="num">
                {Math.abs(difference) < rounding
                  ? 'none'
                  : difference < 0
                    ? `${minus}${formatSignificant(-difference, 2)}`
                    : formatSigned(difference, 15)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function Quoted({ result, digits }: { readonly result: CurveResult; readonly digits: number }) {
  const compared = result.rows.some(({ againstZero }) => againstZero !== null);
  return (
    <div class="table-frame" tabIndex={0} role="region" aria-label="Forwards quoted and what is implied by them">
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Maturity</th>
            <th scope="col" class="num">
              Quoted, outright
            </th>
            <th scope="col" class="num">
              Our break-evens
            </th>
            <th scope="col" class="num">
              Fair
            </th>
            <th scope="col" class="num">
              Implied rate
            </th>
            {compared && (
              <>
                <th scope="col" class="num">
                  Interest-rate curve
                </th>
                <th scope="col" class="num">
                  Apart
                </th>
              </>
            )}
          </tr>
        </thead>
        <tbody>
          {result.rows.map(({ at, date, quote, repriced, fair, impliedZero, againstZero, difference }) => (
            <tr key={at}>
              <th scope="row">{formatDate(date)}</th>
              <td class="num">
                {formatNumber(quote.bid, digits)} / {formatNumber(quote.offer, digits)}
              </td>
              <td class="num">
                {formatNumber(repriced.bid, digits)} / {formatNumber(repriced.offer, digits)}
              </td>
              <td class="num">{formatNumber(fair, digits)}</td>
              <td class="num">{formatPercent(impliedZero, 4)}</td>
              {compared && (
                <>
                  <td class="num">{againstZero === null ? '–' : formatPercent(againstZero, 4)}</td>
                  <td class="num">{difference === null ? '–' : formatBasisPoints(difference, 1)}</td>
                </>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** One of the market's curves: its zero and forward rates, and that what it was made from comes out of it again. */
export function CurveView() {
  const id = useId();
  const [which, setWhich] = useState<Which>('funding');
  const [until, setUntil] = useState('5Y');
  const { market } = built.value.request;
  const choices: readonly Which[] = [
    'funding',
    ...(market.base === undefined ? [] : (['base'] as const)),
    ...(typeof market.income?.yield === 'object' && 'kind' in market.income.yield ? (['yield'] as const) : []),
    ...(market.discount === undefined ? [] : (['discount'] as const)),
  ];
  const shown = choices.includes(which) ? which : 'funding';
  const { result, errors, stale } = useAnswer<CurveResult>(
    coreVersion.value === '' ? null : { format: 'forwright/1', task: 'curve', market, which: shown, until },
  );
  return (
    <section class="block" aria-labelledby={`${id}-name`}>
      <h2 id={`${id}-name`}>Curves</h2>
      <div class="row">
        <div class="segmented" role="radiogroup" aria-label="Curve">
          {choices.map((choice) => (
            <label key={choice}>
              <input type="radio" name={`${id}-which`} checked={choice === shown} onChange={() => setWhich(choice)} />
              <span>{names[choice]}</span>
            </label>
          ))}
        </div>
        <span class="field row">
          <label for={`${id}-until`}>as far as</label>
          <select id={`${id}-until`} value={until} onChange={(event) => setUntil(event.currentTarget.value)}>
            {horizons.map((horizon) => (
              <option key={horizon}>{horizon}</option>
            ))}
          </select>
        </span>
        {result !== null && <span class="muted">{result.convention}</span>}
      </div>
      {errors.map((fault) => (
        <p class="notice wrong" key={`${fault.at} ${fault.code}`}>
          {fault.message}
        </p>
      ))}
      {result !== null && (
        <>
          <Plot
            name={`${names[shown]}: rates to ${until}`}
            axis="date"
            xs={result.points.map(({ date }) => timeOf(date))}
            xName="Date"
            xText={(x) => formatDate(result.points.find(({ date }) => timeOf(date) === x)?.date ?? '')}
            yText={(rate) => formatPercent(rate, 3)}
            leastRange={0.001}
            stale={stale}
            lines={[
              { name: 'zero rate', look: 'main', values: result.points.map(({ zero }) => zero) },
              { name: 'overnight forward', look: 'dashed', values: result.points.map(({ forward }) => forward) },
            ]}
            legend={`Line: zero rate to the date. Dashed: overnight rate from it. Both continuous, ACT/365.FIXED${result.random ? ', of expected factors' : ''}.`}
          />
          {result.instruments.length > 0 && <Instruments result={result} />}
          {result.rows.length > 0 && (
            <Quoted result={result} digits={precisionOf(market.asset.tick, result.rows[0]?.fair ?? 1).between + 2} />
          )}
        </>
      )}
    </section>
  );
}
