import { useState } from 'preact/hooks';
import { formatDate, formatFigures, formatNumber, formatSigned } from '../format';
import type { QuoteRequest, QuoteResult } from '../model/view';
import { pricePrecision } from '../quote/words';

const sides = [
  ['offer', 'Offer'],
  ['bid', 'Bid'],
  ['fair', 'Fair'],
] as const;
type Shown = (typeof sides)[number][0];

const meaning: Readonly<Record<Shown, string>> = {
  offer: 'We sell forward: units are bought today with borrowed money and delivered at settlement.',
  bid: 'We buy forward: units are sold short today, the money is lent, and they are returned at settlement.',
  fair: 'The same at mid prices and without spreads.',
};

/** How the account closes, said plainly: with units for units and no cash left; or that it does not. */
function Closing({
  ledger,
  spot,
  digits,
}: {
  readonly ledger: NonNullable<QuoteResult['ledger']>['fair'];
  readonly spot: number;
  readonly digits: number;
}) {
  const { obligation, closingUnits, closingCash } = ledger;
  const closes = Math.abs(closingCash) <= 1e-9 * spot && Math.abs(closingUnits - obligation) <= 1e-9;
  const units = `${formatFigures(Math.abs(closingUnits))} unit ${closingUnits < 0 ? 'short' : 'held'} against ${formatFigures(Math.abs(obligation))} to ${obligation < 0 ? 'take' : 'deliver'}`;
  return (
    <p>
      <b>{closes ? 'It closes at zero:' : 'It does not close:'}</b> {units}, cash{' '}
      <span class="num">{formatNumber(closingCash, closes ? digits : 12)}</span>
      {closes ? '. The price makes this account and the account makes the price.' : '.'}
    </p>
  );
}

/** The cash-and-carry that makes a price, entry by entry, for one unit. */
export function Ledger({ request, result }: { readonly request: QuoteRequest; readonly result: QuoteResult }) {
  const [shown, setShown] = useState<Shown>('offer');
  const ledger = result.ledger?.[shown];
  if (!ledger) return <p class="muted">No ledger was worked out.</p>;
  const digits = pricePrecision(request, result).between + 2;
  return (
    <>
      <div class="row">
        <div class="segmented" role="radiogroup" aria-label="Side of the ledger">
          {sides.map(([side, name]) => (
            <label key={side}>
              <input type="radio" name="ledger-side" checked={shown === side} onChange={() => setShown(side)} />
              {name}
            </label>
          ))}
        </div>
        <p class="muted">{meaning[shown]}</p>
      </div>
      <div class="frame" role="region" aria-label={`Ledger of the ${shown} side`} tabIndex={0}>
        <table class="table ledger">
          <caption>
            One unit, in {request.market.asset.currency}, at{' '}
            {shown === 'fair' ? 'the fair price' : `the break-even ${shown}`}{' '}
            <b class="num">{formatNumber(ledger.forward, digits)}</b>
          </caption>
          <thead>
            <tr>
              <th scope="col">Date</th>
              <th scope="col">Entry</th>
              <th scope="col" class="num">
                Units
              </th>
              <th scope="col" class="num">
                Held
              </th>
              <th scope="col" class="num">
                Cash
              </th>
              <th scope="col" class="num">
                Balance
              </th>
            </tr>
          </thead>
          <tbody>
            {ledger.rows.map(({ date, text, units, held, cash, balance }, i) => (
              <tr key={i}>
                <td class="date">
                  {ledger.rows[i - 1]?.date === date ? (
                    <span class="sr-only">{formatDate(date)}</span>
                  ) : (
                    formatDate(date)
                  )}
                </td>
                <th scope="row" class="entry">
                  {text}
                </th>
                <td class="num">{units === 0 ? '' : formatSigned(units, 6)}</td>
                <td class="num">{formatNumber(held, 6)}</td>
                <td class="num">{cash === 0 ? '' : formatSigned(cash, digits)}</td>
                <td class="num">{formatNumber(balance, digits)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <Closing ledger={ledger} spot={result.carry.spot} digits={digits} />
    </>
  );
}
