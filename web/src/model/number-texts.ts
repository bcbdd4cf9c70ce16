/** Which texts of a draft are numbers, and the change of all of them from decimal point to decimal comma or back. */
import { swapSigns } from '../input/table';

const numberNames = new Set([
  'amount',
  'bid',
  'borrowSpread',
  'buy',
  'by',
  'correlation',
  'forwardRate',
  'fraction',
  'growth',
  'high',
  'lag',
  'lendSpread',
  'loading',
  'longRun',
  'low',
  'meanReversion',
  'offer',
  'overnight',
  'passBid',
  'passOffer',
  'price',
  'probability',
  'quantity',
  'r0',
  'rate',
  'scale',
  'sell',
  'share',
  'spread',
  'tick',
  'value',
  'volatility',
  'weight',
]);

/** The same numbers written with the other decimal sign; dates, names and codes stay as they are. */
export function withOtherSign<T>(tree: T): T {
  return swapped(tree, '') as T;
}

function swapped(value: unknown, name: string): unknown {
  if (typeof value === 'string') return numberNames.has(name) ? swapSigns(value) : value;
  if (Array.isArray(value)) return value.map((item) => swapped(item, ''));
  if (typeof value === 'object' && value !== null)
    return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, swapped(inner, key)]));
  return value;
}
