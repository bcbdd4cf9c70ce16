import { formatDate, formatNumber, formatPercent, formatSigned } from '../format';
import type { QuoteRequest, QuoteResult } from '../model/view';
import { pricePrecision } from '../quote/words';

type Row = NonNullable<QuoteResult['income']>[number];

/** Why a distribution is in the price or not. */
export function incomeReason({ reason }: Pick<Row, 'reason'>, { dates }: Pick<QuoteResult, 'dates'>): string {
  if (reason === 'counted') return 'counted';
  if (reason === 'passed-through') return 'not in it: passed on to the client when it is paid';
  if (reason === 'adjusts-contract') return 'not in it: the contract is adjusted on the ex date';
  if (reason === 'before-hold')
    return `left out: ex no later than ${formatDate(dates.holdFrom)}, before the hedge is held`;
  return `left out: ex after maturity, ${formatDate(dates.maturity)}`;
}

/** Every distribution of the request: in the price with its units and factor, or left out with the reason. */
export function Income({ request, result }: { readonly request: QuoteRequest; readonly result: QuoteResult }) {
  const rows = result.income ?? [];
  const { carry } = result;
  const digits = pricePrecision(request, result).between + 2;
  if (rows.length === 0 && carry.yield === 0)
    return (
      <p>
        {request.market.asset.kind === 'currency-pair'
          ? 'A currency pair has no distributions: what the base currency earns is its own interest.'
          : 'No income is given: the forward is spot with the cost of funding it.'}
      </p>
    );
  return (
    <>
      <div class="frame" role="region" aria-label="Income" tabIndex={0}>
        <table class="table">
          <thead>
            <tr>
              <th scope="col">Ex date</th>
              <th scope="col">Paid</th>
              <th scope="col" class="num">
                Amount
              </th>
              <th scope="col">In the price</th>
              <th scope="col" class="num">
                Units held
              </th>
              <th scope="col" class="num">
                Factor
              </th>
              <th scope="col" class="num">
                At settlement
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row) => (
              <tr key={row.at} class={row.counted ? undefined : 'left-out'}>
                <th scope="row" class="date">
                  {formatDate(row.ex)}
                </th>
                <td class="date">{row.pay ? formatDate(row.pay) : ''}</td>
                <td class="num">
                  {row.amount !== undefined ? formatNumber(row.amount, digits) : formatPercent(row.fraction ?? 0, 3)}
                </td>
                <td>{incomeReason(row, result)}</td>
                <td class="num">{row.counted ? formatNumber(row.units, 6) : ''}</td>
                <td class="num">{row.counted && row.factor ? formatNumber(row.factor, 6) : ''}</td>
                <td class="num">
                  {row.counted
                    ? formatNumber(row.atSettlement, digits)
                    : row.wouldTake
                      ? `would take ${formatNumber(row.wouldTake, digits)}`
                      : ''}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <p>
        Income moves the fair forward by: cash <b class="num">{formatSigned(carry.cash, digits)}</b>, proportional{' '}
        <b class="num">{formatSigned(carry.proportional, digits)}</b>, yield{' '}
        <b class="num">{formatSigned(carry.yield, digits)}</b> {request.market.asset.currency} a unit.
      </p>
    </>
  );
}
