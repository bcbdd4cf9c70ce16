/** Amounts, prices, rates and basis points as typed, each with the unit its field states. */
import { readDecimal, toNumber, type Decimal, type DecimalSign } from './decimal';
import { notUnderstood, understood, type Parsed } from './parsed';

/**
 * What the number in a field is:
 * `amount` (10k, 1.5mn), `price`, `percent` (sent as a fraction), `basis-points` (sent as a fraction),
 * `margin-points` (basis points, sent as they are), `plain`, `count` (a whole number).
 */
export type NumberKind = 'amount' | 'price' | 'percent' | 'basis-points' | 'margin-points' | 'plain' | 'count';

const thousands: Readonly<Record<string, number>> = {
  k: 3,
  mn: 6,
  mm: 6,
  mio: 6,
  million: 6,
  bn: 9,
  billion: 9,
};

/** How far the decimal point moves between what the field shows and what the request has. */
export function placesOf(kind: NumberKind): number {
  if (kind === 'percent') return -2;
  if (kind === 'basis-points') return -4;
  return 0;
}

interface Suffixed {
  readonly number: string;
  readonly suffix: string;
}

export function splitSuffix(text: string): Suffixed {
  const match = /^(.*?[\d.,])\s*(%|[a-z]+)$/i.exec(text.trim());
  if (match === null || /^e[+-]?\d*$/i.test(match[2] ?? '')) return { number: text.trim(), suffix: '' };
  return { number: match[1] ?? '', suffix: (match[2] ?? '').toLowerCase() };
}

/** The power of ten of a suffix in a field of this kind, or the sentence that refuses it. */
function placesOfSuffix(kind: NumberKind, number: string, suffix: string): Parsed<number> {
  if (suffix === '') return understood(placesOf(kind));
  const rate = kind === 'percent' || kind === 'basis-points';
  if (rate && suffix === '%') return understood(-2);
  if (rate && (suffix === 'bp' || suffix === 'bps')) return understood(-4);
  if (kind === 'margin-points' && (suffix === 'bp' || suffix === 'bps')) return understood(0);
  if (kind === 'margin-points' && suffix === '%') return understood(2);
  if (kind === 'amount' || kind === 'price') {
    if (suffix === 'm')
      return notUnderstood('ambiguous-m', `m could be million: write ${number}mn, or ${number}k for thousand.`);
    const power = thousands[suffix];
    if (power !== undefined) return understood(power);
    return notUnderstood('unknown-suffix', `“${suffix}” is not understood after a number here: k, mn and bn are.`);
  }
  if (rate) return notUnderstood('unknown-suffix', `“${suffix}” is not understood after a rate: % and bp are.`);
  return notUnderstood('unknown-suffix', `“${suffix}” is not understood here: a number alone is.`);
}

/** Reads the text of a number field as the number that the request has. */
export function readNumber(text: string, kind: NumberKind, sign: DecimalSign): Parsed<number> {
  const { number, suffix } = splitSuffix(text);
  const places = placesOfSuffix(kind, number, suffix);
  if (!places.ok) return places;
  const read = readDecimal(number, sign, kind !== 'amount' && kind !== 'count');
  if (!read.ok) return read;
  if (kind === 'count' && !isWhole(read.value))
    return notUnderstood('not-whole', `“${text.trim()}” is not a whole number.`);
  const value = toNumber(read.value, places.value);
  if (!Number.isFinite(value)) return notUnderstood('too-large', `“${text.trim()}” is too large a number.`);
  return understood(value);
}

function isWhole(value: Decimal): boolean {
  return value.exponent >= 0 || /^0+$/.test(value.digits.slice(value.exponent)) || value.digits === '0';
}
