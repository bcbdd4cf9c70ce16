import { Outcomes } from '../charts/outcomes';
import { formatDate, formatFigures, formatNumber, formatPercent, formatSigned, formatSignedMoney } from '../format';
import type { QuoteRequest, QuoteResult } from '../model/view';
import { pricePrecision, unitName } from '../quote/words';

type Block = NonNullable<QuoteResult['random']>;
interface Props {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
}

/** The factor at which money would be discounted if the rate were its average: e to the expected log factor. */
export function averageRateFactor({ logFactor }: Block): number {
  return Math.exp(logFactor.mean);
}

function Comparison({ request, result, block }: Props & { readonly block: Block }) {
  const digits = pricePrecision(request, result).between + 3;
  const { currency } = request.market.asset;
  const average = averageRateFactor(block);
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
            <td class="num">{formatSigned(block.expectedFactor - average, 8)}</td>
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
          <span class="num">{formatFigures(standardError, 6)}</span>; the fair forward lies between{' '}
          <span class="num">{formatNumber(interval95.low, digits)}</span> and{' '}
          <span class="num">{formatNumber(interval95.high, digits)}</span> with 95 % confidence.
        </p>
      )}
      {logFactor.variance !== null && (
        <p class="muted">
          The logarithm of the factor has mean <span class="num">{formatFigures(logFactor.mean, 7)}</span> and standard
          deviation <span class="num">{formatPercent(Math.sqrt(logFactor.variance), 3)}</span>.
        </p>
      )}
      {quantileError > 0 && (
        <p class="muted">Quantiles are right to {formatFigures(quantileError, 2)} of their value at worst.</p>
      )}
    </>
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
          its date today.
        </p>
      </div>
      <Comparison request={request} result={result} block={block} />
      <Outcomes block={block} average={averageRateFactor(block)} when={when} />
      <Precision block={block} digits={pricePrecision(request, result).between + 3} />
    </div>
  );
}
