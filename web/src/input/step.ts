/** What the arrow keys make of a text: the next number, day or tenor, exactly and in the text's own form. */
import { add, grouped, readDecimal, toText, type Decimal, type DecimalSign } from './decimal';
import { daysInMonth, readDate, readTenor, type DateStyle } from './dates';
import { splitSuffix, type NumberKind } from './quantities';

/** The place of the digit that a step changes, as a power of ten of what the field shows. */
function placeOfStep(kind: NumberKind, value: Decimal, suffix: string): number {
  if (suffix === 'bp' || suffix === 'bps') return 0;
  if (suffix === '%' || kind === 'percent') return -2;
  if (suffix !== '') return Math.min(value.exponent, 0);
  if (kind === 'basis-points' || kind === 'margin-points' || kind === 'count') return 0;
  if (kind === 'amount') return Math.max(0, value.digits.length + value.exponent - 2);
  return Math.min(-2, value.exponent);
}

/** `times` steps up (or down, where negative); null where the text is not a number. */
export function stepNumber(text: string, kind: NumberKind, sign: DecimalSign, times: number): string | null {
  const { number, suffix } = splitSuffix(text);
  const read = readDecimal(number === '' ? '0' : number, sign);
  if (!read.ok) return null;
  const place = placeOfStep(kind, read.value, suffix);
  const change: Decimal = { negative: times < 0, digits: String(Math.abs(times)), exponent: place };
  const decimals = Math.max(0, -read.value.exponent, number === '' ? 0 : -place);
  const own = text.trim().slice(number.length);
  const next = toText(add(read.value, change), sign, 0, decimals);
  const wasGrouped = kind === 'amount' && /\d\D\d{3}(?:\D|$)/.test(number) && read.value.exponent === 0;
  return (wasGrouped ? grouped(next, sign) : next) + own;
}

const shortMonths = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** An ISO date as a person writes it: `18 Jun 27`; years that two digits cannot say are whole. */
export function dateToText(iso: string): string {
  const match = /^(\d{4})-(\d\d)-(\d\d)$/.exec(iso);
  const month = shortMonths[Number(match?.[2]) - 1];
  if (match === null || month === undefined) return iso;
  const year = match[1]?.startsWith('20') === true ? match[1].slice(2) : match[1];
  return `${Number(match[3])} ${month} ${year}`;
}

function laterDay(iso: string, days: number): string {
  const [year = 0, month = 1, day = 1] = iso.split('-').map(Number);
  return new Date(Date.UTC(year, month - 1, day + days)).toISOString().slice(0, 10);
}

function laterMonth(iso: string, months: number): string {
  const [year = 0, month = 1, day = 1] = iso.split('-').map(Number);
  const whole = year * 12 + month - 1 + months;
  const [toYear, toMonth] = [Math.floor(whole / 12), (((whole % 12) + 12) % 12) + 1];
  const within = Math.min(day, daysInMonth(toYear, toMonth));
  return new Date(Date.UTC(toYear, toMonth - 1, within)).toISOString().slice(0, 10);
}

/** A date by one day (by one month where `far`), a tenor by one of its unit (ten where `far`). */
export function stepDate(text: string, style: DateStyle, direction: 1 | -1, far: boolean): string | null {
  const tenor = readTenor(text);
  if (tenor !== null) {
    const count = Number(tenor.slice(0, -1)) + direction * (far ? 10 : 1);
    return count < 1 ? null : `${count}${tenor.slice(-1)}`;
  }
  const read = readDate(text, style);
  if (!read.ok) return null;
  const date = far ? laterMonth(read.value, direction) : laterDay(read.value, direction);
  return /^\d{4}-/.test(text.trim()) ? date : dateToText(date);
}
