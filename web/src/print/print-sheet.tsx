import { formatLongDate, formatMoney, formatNumber, formatPercent, formatSigned, formatSignedPercent } from '../format';
import type { Precision } from '../format';
import { settledAnswer } from '../model/view';
import type { Good, QuoteRequest, QuoteResult, Side } from '../model/view';
import { Working } from '../panels/working';
import { assetName, pricePrecision, sideName, sides, unitName } from '../quote/words';
import { now, sheetTime } from '../store/sheet-time';
import { printOptions } from './options';
import { PrintDialog } from './print-dialog';
import { restsOn } from './rests-on';

type Quoted = Pick<Good<QuoteResult>, 'request' | 'result'>;

const asked = { 'two-way': 'A two-way price', buys: 'The client buys', sells: 'The client sells' } as const;
const youDo: Readonly<Record<Side, string>> = { bid: 'you sell', offer: 'you buy' };

function inquiry({ inquiry, market }: QuoteRequest): string {
  const quantity = `${formatNumber(inquiry.quantity)} ${unitName({ inquiry, market } as QuoteRequest)}`;
  return `${asked[inquiry.client]}${inquiry.client === 'two-way' ? ' in' : ''} ${quantity} of ${assetName({ inquiry, market } as QuoteRequest)}, forward`;
}

function Facts({ rows }: { readonly rows: readonly (readonly [string, string])[] }) {
  return (
    <dl class="sheet-facts">
      {rows.map(([name, words]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>{words}</dd>
        </div>
      ))}
    </dl>
  );
}

function Prices({ request, result, precision }: Quoted & { readonly precision: Precision }) {
  const { currency } = request.market.asset;
  return (
    <div class="sheet-prices">
      {sides.map((side) => {
        const price = result.quote[side];
        if (price === null) return null;
        const notional = result.total?.notional[side] ?? null;
        return (
          <div key={side}>
            <p>
              {sideName[side]} · {youDo[side]}
            </p>
            <p class="sheet-price">
              {currency} {formatNumber(price, precision.dealt)}
            </p>
            {notional !== null && <p>{formatMoney(notional, currency)} in all</p>}
          </div>
        );
      })}
    </div>
  );
}

/** The market sheet's day and hour, and whether it may no longer be used. */
function sheetInWords(asOf: string): string {
  const sheet = sheetTime.value;
  if (sheet.asOf !== asOf) return formatLongDate(asOf);
  const when = [formatLongDate(asOf), sheet.time].filter(Boolean).join(', ');
  return [when, sheet.demonstration && 'invented for demonstration', sheet.stale && `stale: ${sheet.why}`]
    .filter(Boolean)
    .join('; ');
}

/** Day and hour by the person's clock. */
function dayAndHour(date: Date): string {
  const two = (part: number): string => String(part).padStart(2, '0');
  const day = `${date.getFullYear()}-${two(date.getMonth() + 1)}-${two(date.getDate())}`;
  return `${formatLongDate(day)}, ${two(date.getHours())}:${two(date.getMinutes())}`;
}

function dates({ request, result: { dates } }: Quoted): (readonly [string, string])[] {
  return [
    ['Market sheet of', sheetInWords(request.market.asOf)],
    ['Made at', dayAndHour(now.value)],
    ['Spot date', formatLongDate(dates.spot)],
    ['Maturity', `${formatLongDate(dates.maturity)}, ${formatNumber(dates.days)} days on`],
    ['Settlement', formatLongDate(dates.settlement)],
  ];
}

/** The margin in money and as a part of each price quoted. */
function margin({ request, result }: Quoted): (readonly [string, string])[] {
  const parts = sides.flatMap((side) => {
    const price = result.quote[side];
    return price === null ? [] : [`${formatPercent(result.margin / price, 3)} of the ${side}`];
  });
  const money = result.total ? formatMoney(result.total.margin, request.market.asset.currency) : '';
  return [['In the price', `${[money, ...parts].filter(Boolean).join(', ')}; before rounding`]];
}

function deskFacts({ result }: Quoted, { between }: Precision): (readonly [string, string])[] {
  return [
    ['Fair', formatNumber(result.fair, between)],
    [
      'Break-even bid, offer',
      `${formatNumber(result.breakEven.bid, between)}, ${formatNumber(result.breakEven.offer, between)}`,
    ],
    ['Points', formatSigned(result.carry.points, between)],
    ['Carry a year', formatSignedPercent(result.annualised)],
  ];
}

/** What must stand on every quote that is handed out. */
export const cautions: readonly string[] = [
  'This is an indication and not an offer. Nothing is agreed until the dealing desk has confirmed it.',
  'Prices move: it held for the market sheet named above when it was made and may change at any moment.',
  'Dealing is subject to credit approval and to documentation between the parties.',
  'It is no advice and takes no account of anybody’s circumstances, aims or other positions.',
  'A forward binds both sides until it settles. The market can move far from the price agreed, and the loss may be large.',
  'Local rules on dealing, suitability and disclosure apply; licensed staff decide.',
];

function Sheet({ request, result, notices, assumed }: Good<QuoteResult>) {
  const { copyFor, margin: showsMargin, working } = printOptions.value;
  const forDesk = copyFor === 'desk';
  const precision = pricePrecision(request, result);
  // A client's copy tells how the fair price comes about; the sides' own steps and the margin's belong to the desk.
  const told: QuoteResult = forDesk
    ? result
    : { ...result, working: (result.working ?? []).filter(({ side }) => side === 'dates' || side === 'fair') };
  return (
    <>
      <header>
        <h1>{assetName(request)}: indicative forward price</h1>
        <p>
          {inquiry(request)} to {formatLongDate(result.dates.maturity)}
        </p>
      </header>
      <Prices request={request} result={result} precision={precision} />
      <h2>Dates</h2>
      <Facts rows={dates({ request, result })} />
      <h2>What it rests on</h2>
      <Facts rows={restsOn(request, forDesk).map(({ name, words }) => [name, words] as const)} />
      {(forDesk || showsMargin) && (
        <>
          <h2>{forDesk ? 'For the desk' : 'Our margin'}</h2>
          <Facts
            rows={[...(forDesk ? deskFacts({ request, result }, precision) : []), ...margin({ request, result })]}
          />
        </>
      )}
      {notices.length > 0 && (
        <>
          <h2>To be known</h2>
          <ul>
            {notices.map(({ at, code, message }) => (
              <li key={`${at} ${code}`}>{message}</li>
            ))}
          </ul>
        </>
      )}
      <section class="sheet-cautions">
        <h2>Please note</h2>
        <ul>
          {cautions.map((caution) => (
            <li key={caution}>{caution}</li>
          ))}
        </ul>
      </section>
      {working && (
        <section class="sheet-working">
          <h2>How {forDesk ? 'the price' : 'the fair price'} is worked out</h2>
          <Working request={request} result={told} unfolded />
          {forDesk && assumed.length > 0 && (
            <p>
              Assumed where nothing was said:{' '}
              {assumed
                .map(({ at, value }) => `${at.slice(at.lastIndexOf('/') + 1)} ${JSON.stringify(value)}`)
                .join(', ')}
              .
            </p>
          )}
        </section>
      )}
      <footer>Indicative until the desk confirms. Market sheet of {sheetInWords(request.market.asOf)}.</footer>
    </>
  );
}

/** The quote on paper, and the question what it is to show. On screen the sheet is not there. */
export function PrintSheet() {
  const { good, stale } = settledAnswer.value;
  return (
    <>
      <PrintDialog />
      <article class="print-sheet">
        {!good && <p>There is no price to print.</p>}
        {good && stale && <p class="sheet-stale">This is an earlier price: what is typed now has no price yet.</p>}
        {good && <Sheet {...good} />}
      </article>
    </>
  );
}
