/** Dates and tenors as people write them. */
import { notUnderstood, understood, type Parsed } from './parsed';

export interface DateStyle {
  /** BCP 47: the names of months, and whether the day or the month comes first in 3/4/27. */
  readonly locale: string;
  /** ISO date that `18 Jun` without a year comes after. */
  readonly after: string;
}

const englishMonths = [
  'january',
  'february',
  'march',
  'april',
  'may',
  'june',
  'july',
  'august',
  'september',
  'october',
  'november',
  'december',
];

const monthNames = new Map<string, readonly string[][]>();

/** Every name of each month, lower case, in English and in the person's language. */
function namesOfMonths(locale: string): readonly string[][] {
  const known = monthNames.get(locale);
  if (known !== undefined) return known;
  const names = englishMonths.map((english, month) => {
    const local = (['short', 'long'] as const).map((style) =>
      new Intl.DateTimeFormat(locale, { month: style, day: 'numeric', timeZone: 'UTC' })
        .formatToParts(Date.UTC(2024, month, 1))
        .filter((part) => part.type === 'month')
        .map((part) => part.value.toLowerCase().replace(/\.$/, ''))
        .join(''),
    );
    return [english, ...local];
  });
  monthNames.set(locale, names);
  return names;
}

function monthNamed(word: string, locale: string): number | null {
  const name = word.toLowerCase().replace(/\.$/, '');
  if (!/\p{L}{3}/u.test(name)) return null;
  const months = namesOfMonths(locale)
    .map((names, index) => (names.some((full) => full === name || full.startsWith(name)) ? index + 1 : 0))
    .filter((month) => month > 0);
  return months.length === 1 ? (months[0] ?? null) : null;
}

function monthComesFirst(locale: string): boolean {
  const parts = new Intl.DateTimeFormat(locale, { day: 'numeric', month: 'numeric', year: 'numeric', timeZone: 'UTC' })
    .formatToParts(Date.UTC(2024, 11, 25))
    .map((part) => part.type);
  return parts.indexOf('month') < parts.indexOf('day') && parts.indexOf('day') < parts.indexOf('year');
}

export function daysInMonth(year: number, month: number): number {
  return new Date(Date.UTC(year, month, 0)).getUTCDate();
}

function isoOf(year: number, month: number, day: number): string {
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${String(year).padStart(4, '0')}-${two(month)}-${two(day)}`;
}

function checked(text: string, year: number, month: number, day: number): Parsed<string> {
  if (month < 1 || month > 12)
    return notUnderstood('not-a-date', `“${text}” is not a date: there is no month ${month}.`);
  const last = daysInMonth(year, month);
  if (day < 1 || day > last)
    return notUnderstood('not-a-date', `“${text}” is not a date: that month has ${last} days.`);
  return understood(isoOf(year, month, day));
}

function fullYear(digits: string): number {
  return digits.length <= 2 ? 2000 + Number(digits) : Number(digits);
}

/** The day and month without a year: the next time they come after `after`. */
function nextTime(text: string, month: number, day: number, after: string): Parsed<string> {
  const year = Number(after.slice(0, 4)) || 2000;
  for (let ahead = 0; ahead <= 8; ++ahead) {
    if (day > daysInMonth(year + ahead, month)) continue;
    const date = isoOf(year + ahead, month, day);
    if (date > after) return understood(date);
  }
  return checked(text, year, month, day);
}

/** Reads a date: `18 Jun 27`, `18.06.2027`, `18/6/27`, `June 18, 2027`, `18 Jun`, `2027-06-18`, `20270618`. */
export function readDate(text: string, style: DateStyle): Parsed<string> {
  const typed = text.trim();
  const words = typed
    .replace(/^\p{L}+\.?,?\s+(?=\d)/u, (first) =>
      monthNamed(first.replace(/[,\s]/g, ''), style.locale) === null ? '' : first,
    )
    .replace(/(\d)(st|nd|rd|th)\b/i, '$1');

  let match =
    /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})(?:[T ]\d\d:\d\d.*)?$/.exec(words) ?? /^(\d{4})(\d\d)(\d\d)$/.exec(words);
  if (match !== null) return checked(typed, Number(match[1]), Number(match[2]), Number(match[3]));

  match = /^(\d{1,2})[\s.\-/]*(\p{L}+)\.?(?:[\s.,\-/]*(\d{4}|\d{2}))?$/u.exec(words);
  if (match !== null) {
    const month = monthNamed(match[2] ?? '', style.locale);
    if (month !== null) {
      if (match[3] === undefined) return nextTime(typed, month, Number(match[1]), style.after);
      return checked(typed, fullYear(match[3]), month, Number(match[1]));
    }
  }

  match = /^(\p{L}+)\.?[\s.\-/]*(\d{1,2})(?:(?:\s*,\s*|\s+|[-/])(\d{4}|\d{2}))?$/u.exec(words);
  if (match !== null) {
    const month = monthNamed(match[1] ?? '', style.locale);
    if (month !== null) {
      if (match[3] === undefined) return nextTime(typed, month, Number(match[2]), style.after);
      return checked(typed, fullYear(match[3]), month, Number(match[2]));
    }
  }

  match = /^(\d{1,2})[./-](\d{1,2})[./-](\d{4}|\d{2})$/.exec(words);
  if (match !== null) {
    const [one, two] = [Number(match[1]), Number(match[2])];
    const monthFirst = two > 12 || (one <= 12 && !typed.includes('.') && monthComesFirst(style.locale));
    const [month, day] = monthFirst ? [one, two] : [two, one];
    return checked(typed, fullYear(match[3] ?? ''), month, day);
  }
  return notUnderstood('not-a-date', `“${typed}” is not a date: write it as 18 Jun 27 or 2027-06-18.`);
}

const tenorUnits: Readonly<Record<string, string>> = {
  d: 'D',
  day: 'D',
  days: 'D',
  w: 'W',
  week: 'W',
  weeks: 'W',
  m: 'M',
  month: 'M',
  months: 'M',
  y: 'Y',
  year: 'Y',
  years: 'Y',
};

/** Reads `3M`, `3 m`, `2w`, `10 days`, `1 year` as the contract's tenor; null where the text is no tenor. */
export function readTenor(text: string): string | null {
  const match = /^(\d{1,5})\s*([a-z]+)$/i.exec(text.trim());
  const unit = match === null ? undefined : tenorUnits[(match[2] ?? '').toLowerCase()];
  return match === null || unit === undefined ? null : `${Number(match[1])}${unit}`;
}

/** `ON`, `o/n`, `TN`, `SN` as the contract names them; null where the text is none of them. */
function readShortPeriod(text: string): string | null {
  const match = /^([ots])\s*\/?\s*n$/i.exec(text.trim());
  return match === null ? null : `${(match[1] ?? '').toUpperCase()}N`;
}

/** `3rd Wed Mar 27`, `third Friday March 2027` as the contract writes it; null where the text is none. */
function readThirdDay(text: string, style: DateStyle): string | null {
  const match = /^(?:3rd|3\.|third)[\s-]*(wednesday|wed|friday|fri)\.?\s*(?:of|in)?\s*(.+)$/i.exec(text.trim());
  if (match === null) return null;
  const day = (match[1] ?? '').toLowerCase().startsWith('w') ? 'wednesday' : 'friday';
  const named = /^(\d{4})-(\d{2})$/.exec(match[2] ?? '');
  if (named !== null) return `third-${day} ${named[1] ?? ''}-${named[2] ?? ''}`;
  const first = readDate(`1 ${match[2] ?? ''}`, style);
  return first.ok ? `third-${day} ${first.value.slice(0, 7)}` : null;
}

/** Reads a date, a tenor, a short period, or a month's third Wednesday or Friday. */
export function readMaturity(text: string, style: DateStyle): Parsed<string> {
  const tenor = readTenor(text);
  const named = tenor ?? readShortPeriod(text) ?? readThirdDay(text, style);
  if (named !== null) return understood(named);
  const date = readDate(text, style);
  if (date.ok || date.code !== 'not-a-date' || !date.message.endsWith('2027-06-18.')) return date;
  return notUnderstood('not-a-date', `“${text.trim()}” is neither a date nor a tenor: write it as 18 Jun 27 or 3M.`);
}
