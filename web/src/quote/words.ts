/** What the quote is called in words: for the card, for what is copied, for paper. */
import { formatLongDate, formatNumber, precisionOf } from '../format';
import type { Precision } from '../format';
import type { QuoteRequest, QuoteResult, Side } from '../model/view';

export const sideName = { bid: 'We bid', offer: 'We offer' } as const;
export const clientDoes = { bid: 'client sells', offer: 'client buys' } as const;
export const sides: readonly Side[] = ['bid', 'offer'];

export function assetName({ market }: QuoteRequest): string {
  const { name, kind, base, currency } = market.asset;
  return name ?? (kind === 'currency-pair' && base ? `${base}/${currency}` : kind);
}

/** What the quantity counts: shares, index units, units of the base currency, units of a commodity. */
export function unitName({ market }: Pick<QuoteRequest, 'market'>): string {
  const { kind, base } = market.asset;
  if (kind === 'share') return 'shares';
  return kind === 'currency-pair' && base ? base : 'units';
}

export function pricePrecision(request: QuoteRequest, result: QuoteResult): Precision {
  return precisionOf(request.market.asset.tick, result.carry.spot);
}

/** The dates in a few words: when it matures and, if that is another day, when it settles. */
export function datesInWords({ dates }: QuoteResult): string {
  const settles = dates.settlement === dates.maturity ? '' : `, settling ${formatLongDate(dates.settlement)}`;
  return `${formatLongDate(dates.maturity)}${settles}`;
}

/** The price as a sentence to put in a message. */
export function priceInWords(request: QuoteRequest, result: QuoteResult): string {
  const { dealt } = pricePrecision(request, result);
  const prices = sides.flatMap((side) => {
    const price = result.quote[side];
    return price === null ? [] : [`${sideName[side]} ${formatNumber(price, dealt)} (${clientDoes[side]})`];
  });
  return [
    `${formatNumber(request.inquiry.quantity)} ${unitName(request)} of ${assetName(request)}`,
    `forward to ${datesInWords(result)}`,
    `${request.market.asset.currency}: ${prices.join(', ')}`,
    'indicative until the desk confirms',
  ].join('; ');
}
