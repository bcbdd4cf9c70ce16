import { Plot } from '../charts/plot';
import { bindDraft } from '../fields/binding';
import { Field } from '../fields/field';
import {
  formatDate,
  formatFigures,
  formatNumber,
  formatSigned,
  formatSignedMoney,
  formatSignedPercent,
  precisionOf,
  timeOf,
} from '../format';
import { readNumber } from '../input/quantities';
import type { FuturesResult } from '../model/answer';
import { format } from '../model/view';
import type { Fault } from '../model/view';
import { unitName } from '../quote/words';
import { built } from '../store/calculation';
import { draft } from '../store/session';
import { coreVersion } from '../store/signals';
import { useAnswer } from '../store/use-answer';
import { Elsewhere } from './elsewhere';
import { maturitiesOf } from './maturities';

type Row = NonNullable<FuturesResult['rows']>[number];

/** By rising maturity, each once: those of the list, and the inquiry's own. */
function rowsOf({ rows = [], ...own }: FuturesResult): readonly Row[] {
  const byDate = new Map([...rows, own].map((row) => [row.maturity, row]));
  return [...byDate.values()].sort((one, other) => timeOf(one.maturity) - timeOf(other.maturity));
}

function Table({ rows, digits, own }: { rows: readonly Row[]; digits: number; own: string }) {
  const { request } = built.value;
  const { currency } = request.market.asset;
  return (
    <div class="table-frame" tabIndex={0} role="region" aria-label="Futures and forwards by maturity">
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Maturity</th>
            <th scope="col" class="num">
              Forward
            </th>
            <th scope="col" class="num">
              Future
            </th>
            <th scope="col" class="num">
              Future over forward
            </th>
            <th scope="col" class="num">
              From gains’ timing
            </th>
            <th scope="col" class="num">
              From the random factor
            </th>
            <th scope="col" class="num">
              Together
            </th>
            <th scope="col" class="num">
              On {formatNumber(request.inquiry.quantity)} {unitName(request)}
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.maturity} class={row.maturity === own ? 'total' : undefined}>
              <th scope="row" class="date">
                {formatDate(row.maturity)}
              </th>
              <td class="num">{formatNumber(row.forward, digits)}</td>
              <td class="num strong">{formatNumber(row.futures, digits)}</td>
              <td class="num">{formatFigures(row.ratio, 9)}</td>
              <td class="num">
                {formatSigned(row.parts.covariance, digits)}{' '}
                <small>{formatSignedPercent(row.terms.covariance, 4)}</small>
              </td>
              <td class="num">
                {formatSigned(row.parts.convexity, digits)} <small>{formatSignedPercent(row.terms.convexity, 4)}</small>
              </td>
              <td class="num">{formatSigned(row.difference, digits)}</td>
              <td class="num">{formatSignedMoney(row.onQuantity, currency)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

function wrongAt(member: string, errors: readonly Fault[]): Fault | null {
  return errors.find(({ at }) => at === `/${member}`) ?? null;
}

/** The future beside the forward, over maturities, split into its two causes. */
export function Futures() {
  const { locale, decimal } = format.value;
  const { request } = built.value;
  const volatility = bindDraft('analysis/futures/volatility');
  const correlation = bindDraft('analysis/futures/correlation');
  const read = {
    volatility: readNumber(volatility.text, 'percent', decimal),
    correlation: readNumber(correlation.text, 'plain', decimal),
  };
  const { maturity, roll } = request.inquiry;
  const more = maturitiesOf(draft.value.tenors.maturities, locale, request.market.asOf);
  const typed =
    read.volatility.ok && read.correlation.ok
      ? { volatility: read.volatility.value, correlation: read.correlation.value }
      : null;
  const ready = typed !== null && coreVersion.value !== '';
  const { result, errors, stale } = useAnswer<FuturesResult>(
    ready
      ? {
          format: 'forwright/1',
          task: 'futures',
          market: request.market,
          maturity,
          ...(roll === undefined ? {} : { roll }),
          ...typed,
          quantity: request.inquiry.quantity,
          maturities: more.map((word) => word.maturity),
        }
      : null,
  );
  const typedWrong = (member: keyof typeof read, text: string): Fault | null => {
    const parsed = read[member];
    if (text.trim() !== '' && !parsed.ok) return { at: `/${member}`, code: parsed.code, message: parsed.message };
    return wrongAt(member, errors);
  };
  const apart = errors.find(({ at }) => at.startsWith('/market/funding') || at.startsWith('/maturities'));
  const rows = result === null ? [] : rowsOf(result);
  const digits = precisionOf(request.market.asset.tick, result?.forward ?? 1).between + 2;
  return (
    <>
      <p>
        A future on the same asset is settled every day; a forward once, at the end. Where rates are random the two
        differ, for two causes: gains that come in when rates are high earn more than those that come in when they are
        low, which hangs on how the asset moves with rates; and the discount factor is random itself. Only here does the
        correlation matter: the forward does not have it.
      </p>
      <div class="field-row simulation-fields">
        <Field
          label="Volatility of the asset"
          path={volatility.path}
          kind="percent"
          unit="% a year"
          binding={volatility}
          wrong={typedWrong('volatility', volatility.text)}
        />
        <Field
          label="Correlation with the short rate"
          path={correlation.path}
          kind="plain"
          hint="From −1 to 1."
          binding={correlation}
          wrong={typedWrong('correlation', correlation.text)}
        />
      </div>
      {apart === undefined ? <Elsewhere /> : <p class="notice wrong">{apart.message}</p>}
      {!ready && coreVersion.value !== '' && <p class="muted">Type the volatility and the correlation.</p>}
      {result !== null && (
        <div class="random" data-stale={stale}>
          {rows.length > 1 && (
            <Plot
              name="Future less forward, by cause"
              axis="date"
              xs={rows.map((row) => timeOf(row.maturity))}
              xName="Maturity"
              xText={(x) => formatDate(rows.find((row) => timeOf(row.maturity) === x)?.maturity ?? '')}
              yText={(value) => formatSigned(value, digits)}
              leastRange={10 ** -digits}
              rest={rows.findIndex((row) => row.maturity === result.maturity)}
              lines={[
                { name: 'together', look: 'main', values: rows.map((row) => row.difference) },
                { name: 'gains’ timing', look: 'dashed', values: rows.map((row) => row.parts.covariance) },
                { name: 'random factor', look: 'dotted', values: rows.map((row) => row.parts.convexity) },
              ]}
              levels={[{ name: 'no difference', value: 0 }]}
              legend="Line: future less forward, a unit. Dashed: what gains’ timing makes of it. Dotted: the random factor."
            />
          )}
          <Table rows={rows} digits={digits} own={result.maturity} />
          <p class="muted">Small: the same as exponents, whose sum is the logarithm of future over forward.</p>
          <p class="muted">The maturities are those listed under By maturity, and the inquiry’s own.</p>
        </div>
      )}
    </>
  );
}
