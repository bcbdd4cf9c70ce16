/** How old the market on screen is: when it was taken down, until when it may be used, and whether it is stale. */
import { computed, signal } from '@preact/signals';
import { readDate } from '../input/dates';
import { typed, valueOf } from './session';
import { preferences } from './signals';

/** The time by the person's clock, to the minute. */
export const now = signal(new Date());

export function watchTheClock(): void {
  setInterval(() => {
    now.value = new Date();
  }, 30_000);
}

export interface SheetTime {
  /** ISO date of the market, empty where it cannot be read. */
  readonly asOf: string;
  /** `08:40`, empty where not said. */
  readonly time: string;
  readonly stale: boolean;
  /** Why it is stale, in a few words. */
  readonly why: string;
  readonly demonstration: boolean;
}

function isoDay(date: Date): string {
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${date.getFullYear()}-${two(date.getMonth() + 1)}-${two(date.getDate())}`;
}

function whyStale(asOf: string, validUntil: string, at: Date): string {
  if (asOf === '') return 'no date';
  if (asOf !== isoDay(at)) return asOf < isoDay(at) ? 'not today’s' : 'dated ahead';
  const until = Date.parse(validUntil);
  return Number.isFinite(until) && at.getTime() > until ? 'past its time' : '';
}

export const sheetTime = computed<SheetTime>(() => {
  const [asOfTyped, madeAt, validUntil] = ['market/asOf', 'madeAt', 'validUntil'].map(typed) as [
    string,
    string,
    string,
  ];
  const demonstration = valueOf('demonstration') === true;
  const read = readDate(asOfTyped, { locale: preferences.value.locale, after: '' });
  const asOf = asOfTyped.trim() !== '' && read.ok ? read.value : '';
  const why = whyStale(asOf, validUntil, now.value);
  const time = /T(\d\d:\d\d)/.exec(madeAt)?.[1] ?? '';
  return { asOf, time, stale: why !== '', why, demonstration };
});
