/** Dates as people on a dealing desk write them. No clock and no time zone: an ISO date is a day, not a moment. */
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;
const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat'] as const;
const isoDate = /^(\d{4})-(\d{2})-(\d{2})$/;

interface Day {
  readonly year: number;
  readonly month: string;
  readonly day: number;
  readonly weekday: string;
}

export function isIsoDate(text: unknown): text is string {
  return typeof text === 'string' && isoDate.test(text);
}

/** Milliseconds of the day's beginning in UTC, to place it on an axis. */
export function timeOf(iso: string): number {
  return Date.parse(`${iso}T00:00:00Z`);
}

/** The day that a text names; none for what is no date or no day of any month. */
function dayOf(iso: string): Day | null {
  const [, year, month, day] = isoDate.exec(iso) ?? [];
  const name = months[Number(month) - 1];
  const date = new Date(timeOf(iso));
  const weekday = weekdays[date.getUTCDay()];
  if (!name || !weekday || date.getUTCDate() !== Number(day)) return null;
  return { year: Number(year), month: name, day: Number(day), weekday };
}

/** `18 Jun 27`; what is no date stays as it is. */
export function formatDate(iso: string): string {
  const date = dayOf(iso);
  return date ? `${date.day} ${date.month} ${String(date.year % 100).padStart(2, '0')}` : iso;
}

/** `Fri 18 Jun 2027`. */
export function formatLongDate(iso: string): string {
  const date = dayOf(iso);
  return date ? `${date.weekday} ${date.day} ${date.month} ${date.year}` : iso;
}

/** `Jun`, and `Jan 27` in January: what stands under a tick of a time axis. */
export function formatMonth(iso: string): string {
  const date = dayOf(iso);
  if (!date) return iso;
  return date.month === 'Jan' ? `Jan ${String(date.year % 100).padStart(2, '0')}` : date.month;
}

/** A sentence of the core with its ISO dates written as on the desk. */
export function datesInText(text: string): string {
  return text.replace(/\b\d{4}-\d{2}-\d{2}\b/g, formatDate);
}
