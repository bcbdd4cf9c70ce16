/**
 * Numbers as the person reads them: their grouping and decimal sign, a true minus, figures of fixed length.
 * Nothing here rounds a price for dealing: the core has done that; here digits beyond the last shown are only left off.
 */
import { format } from '../model/view';

export const minus = '\u2212';
/** Keeps a number and its unit on one line. */
export const thinSpace = '\u202f';

const formatters = new Map<string, Intl.NumberFormat>();

function formatter(locale: string, least: number, most: number): Intl.NumberFormat {
  const key = `${locale} ${least} ${most}`;
  const known = formatters.get(key);
  if (known) return known;
  const made = new Intl.NumberFormat(locale, {
    minimumFractionDigits: least,
    maximumFractionDigits: most,
    numberingSystem: 'latn',
  });
  formatters.set(key, made);
  return made;
}

function written(value: number, least: number, most: number): string {
  const { locale, decimal } = format.value;
  const parts = formatter(locale, least, most).formatToParts(value);
  const zero = parts.every(({ type, value: text }) => !['integer', 'fraction'].includes(type) || /^0*$/.test(text));
  return parts
    .map(({ type, value: text }) => {
      if (type === 'minusSign') return zero ? '' : minus;
      if (type === 'decimal') return decimal;
      if (type === 'group') return text === decimal || text.trim() === '' ? thinSpace : text;
      return text;
    })
    .join('');
}

/** With exactly `digits` decimals; without `digits`, as many as it has, up to ten. What is shown as 0 has no sign. */
export function formatNumber(value: number, digits?: number): string {
  return digits === undefined ? written(value, 0, 10) : written(value, digits, digits);
}

/** With about `figures` figures and no trailing zeros: factors, rates and units in the working. */
export function formatFigures(value: number, figures = 9): string {
  const whole = value === 0 ? 1 : Math.max(1, Math.floor(Math.log10(Math.abs(value))) + 1);
  return written(value, 0, Math.min(12, Math.max(0, figures - whole)));
}

/** With so many significant figures however small it is: errors and odds. Up to 15 decimals. */
export function formatSignificant(value: number, figures: number): string {
  const first = value === 0 ? 0 : Math.floor(Math.log10(Math.abs(value)));
  return written(value, 0, Math.min(15, Math.max(0, figures - 1 - first)));
}

/** A change: always with its sign, but for one shown as 0. */
export function formatSigned(value: number, digits?: number): string {
  const text = formatNumber(value, digits);
  return value > 0 && /[1-9]/.test(text) ? `+${text}` : text;
}

/** The decimals of a tick: 2 for 0.01 and for 0.25, 5 for 0.00005, 0 for 1 and for 5. */
export function decimalsOfTick(tick: number): number {
  const [mantissa = '', exponent = '0'] = String(tick).split('e');
  const written = mantissa.split('.')[1]?.length ?? 0;
  return Math.max(0, written - Number(exponent));
}

/** Decimals that show about six figures, and two at least, where no tick says how many. */
function decimalsOfSize(value: number): number {
  const whole = Math.max(1, Math.ceil(Math.log10(Math.abs(value) + 1e-12)));
  return Math.min(6, Math.max(2, 6 - whole));
}

export interface Precision {
  /** Of a price that is dealt. */
  readonly dealt: number;
  /** Of one that is not, such as a break-even: never fewer than two. */
  readonly between: number;
}

/** How many decimals the prices of one asset have: the tick's, or by the size of spot. */
export function precisionOf(tick: number | undefined, spot: number): Precision {
  const dealt = tick === undefined ? decimalsOfSize(spot) : decimalsOfTick(tick);
  return { dealt, between: Math.max(2, dealt) };
}

export function formatPrice(value: number, tick?: number): string {
  return formatNumber(value, precisionOf(tick, value).dealt);
}

/** A fraction as per cent: 0.0118 is 1.18 %. */
export function formatPercent(fraction: number, digits = 2): string {
  return `${formatNumber(fraction * 100, digits)}${thinSpace}%`;
}

export function formatSignedPercent(fraction: number, digits = 2): string {
  return `${formatSigned(fraction * 100, digits)}${thinSpace}%`;
}

/** A fraction as basis points: 0.0012 is 12 bp. */
export function formatBasisPoints(fraction: number, digits = 0): string {
  return `${formatNumber(fraction * 1e4, digits)}${thinSpace}bp`;
}

/** Decimals of a currency by ISO 4217: 2 for EUR, 0 for JPY, 3 for KWD; 2 for a code that is none. */
export function minorUnits(currency: string): number {
  try {
    const { maximumFractionDigits } = new Intl.NumberFormat('en', { style: 'currency', currency }).resolvedOptions();
    return maximumFractionDigits ?? 2;
  } catch {
    return 2;
  }
}

/** `EUR 480 450.00`, with the decimals of the currency. */
export function formatMoney(value: number, currency: string): string {
  return `${currency}\u00a0${formatNumber(value, minorUnits(currency))}`;
}

export function formatSignedMoney(value: number, currency: string): string {
  return `${currency}\u00a0${formatSigned(value, minorUnits(currency))}`;
}
