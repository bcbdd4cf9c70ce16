import { MeetingsEditor } from '../cards/meetings-editor';
import { Outcomes } from '../charts/outcomes';
import { RateTree } from '../charts/rate-tree';
import {
  formatDate,
  formatFigures,
  formatSignificant,
  formatNumber,
  formatPercent,
  formatSigned,
  formatSignedMoney,
} from '../format';
import type { QuoteRequest, QuoteResult } from '../model/view';
import { pricePrecision, unitName } from '../quote/words';
import { SimulationView } from './simulation';

type Block = NonNullable<QuoteResult['random']>;
interface Props {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
}

function Comparison({ request, result, block }: Props & { readonly block: Block }) {
  const digits = pricePrecision(request, result).between + 3;
  const { currency } = request.market.asset;
  const { averageRateFactor: average } = block;
  const onAll = result.total?.gap ?? null;
  return (
    <div class="frame" role="region" aria-label="Expected factor and factor at the average rate" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Discounting at</th>
            <th scope="col" class="num">
              Factor
            </th>
            <th scope="col" class="num">
              Fair forward
            </th>
          </tr>
        </thead>
        <tbody>
          <tr>
            <th scope="row">the expected factor, as priced</th>
            <td class="num">{formatNumber(block.expectedFactor, 8)}</td>
            <td class="num">
              <b>{formatNumber(result.fair, digits)}</b>
            </td>
          </tr>
          <tr>
            <th scope="row">the average rate</th>
            <td class="num">{formatNumber(average, 8)}</td>
            <td class="num">{formatNumber(block.averageRateForward, digits)}</td>
          </tr>
          <tr class="total">
            <th scope="row">
              the gap
              {onAll !== null &&
                `: ${formatSignedMoney(onAll, currency)} on ${formatNumber(request.inquiry.quantity)} ${unitName(request)}`}
            </th>
            <td class="num">{formatSigned(block.factorGap, 8)}</td>
            <td class="num">{formatSigned(block.gap, digits)}</td>
          </tr>
        </tbody>
      </table>
    </div>
  );
}

function Precision({ block, digits }: { readonly block: Block; readonly digits: number }) {
  const { paths, standardError, interval95, quantileError, logFactor } = block;
  return (
    <>
      {paths !== undefined && standardError !== undefined && interval95 && (
        <p>
          From {formatNumber(paths)} paths: standard error of the factor{' '}
          <span class="num">{formatSignificant(standardError, 3)}</span>; the fair forward lies between{' '}
          <span class="num">{formatNumber(interval95.low, digits)}</span> and{' '}
          <span class="num">{formatNumber(interval95.high, digits)}</span> with 95 % confidence.
        </p>
      )}
      {logFactor.deviation !== null && (
        <p class="muted">
          The logarithm of the factor has mean <span class="num">{formatFigures(logFactor.mean, 7)}</span> and standard
          deviation <span class="num">{formatPercent(logFactor.deviation, 3)}</span>.
        </p>
      )}
      {quantileError > 0 && (
        <p class="muted">Quantiles are right to {formatSignificant(quantileError, 2)} of their value at worst.</p>
      )}
    </>
  );
}

/** Samples brought from elsewhere beside the market's own curve. */
function Against({ columns }: { readonly columns: NonNullable<Block['against']> }) {
  return (
    <div class="frame" role="region" aria-label="Samples beside the market’s curve" tabIndex={0}>
      <table class="table">
        <thead>
          <tr>
            <th scope="col">Samples on</th>
            <th scope="col" class="num">
              Mean
            </th>
            <th scope="col" class="num">
              Its error
            </th>
            <th scope="col" class="num">
              The curve’s factor
            </th>
            <th scope="col" class="num">
              Apart, in errors
            </th>
          </tr>
        </thead>
        <tbody>
          {columns.map(({ date, mean, standardError, factor, errors }) => (
            <tr key={date}>
              <th scope="row">{formatDate(date)}</th>
              <td class="num">{formatNumber(mean, 8)}</td>
              <td class="num">{standardError === null ? '–' : formatSignificant(standardError, 3)}</td>
              <td class="num">{formatNumber(factor, 8)}</td>
              <td class="num">{errors === null ? '–' : formatSigned(errors, 1)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** What random funding does to the price, and what it does not. */
export function RandomDiscount({ request, result }: Props) {
  const block = result.random;
  const when = formatDate(result.dates.settlement);
  if (!block)
    return (
      <p>
        Funding is not random here: one discount factor, <b class="num">{formatNumber(result.factors.settlement, 8)}</b>
        , brings money from {when} to today, and the forward divides by it.
      </p>
    );
  return (
    <div class="random">
      <div class="random-words">
        <p>
          <b>What randomness changes:</b> the forward divides by the discount factor that is expected. The average of
          the factors is more than the factor at the average rate, so whoever discounts at the average rate gets another
          forward.
        </p>
        <p>
          <b>What it does not change:</b> only that one expected factor enters, not how far outcomes lie apart. The
          hedge is the same and the ledger closes at zero, whichever rate comes true, as money is borrowed and lent to
          its date today. Nor does it matter whether the asset moves with rates: its price today is in the forward, its
          way there is not. (It matters to a future, which is settled every day: see Requests, Futures.) Distributions
          are discounted by the same random factors, each to its own date.
        </p>
      </div>
      <Comparison request={request} result={result} block={block} />
      <Outcomes
        name={`Discount factor to ${when}: where outcomes lie`}
        what="Factor"
        quantiles={block.quantiles.map(({ probability, factor }) => ({ probability, value: factor }))}
        marks={[
          { name: 'expected', value: block.expectedFactor },
          { name: 'at average rate', value: block.averageRateFactor },
        ]}
        digits={4}
        fineDigits={6}
      />
      <Precision block={block} digits={pricePrecision(request, result).between + 3} />
      {block.against && <Against columns={block.against} />}
      {block.tree && (
        <>
          <RateTree tree={block.tree} />
          <details class="tree-editor">
            <summary>Change the meetings and their odds here</summary>
            <MeetingsEditor path="market/funding/curve/meetings" at="/market/funding/curve" />
          </details>
        </>
      )}
      <SimulationView request={request} />
    </div>
  );
}
