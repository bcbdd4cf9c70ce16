import type { ScaleTime } from 'd3-scale';
import { formatDate, formatMonth } from '../format';
import { thatFit } from './path-geometry';
import { textWidth } from './text-width';

export interface TimeTick {
  readonly at: number;
  readonly text: string;
}

function isoOf(date: Date): string {
  return date.toISOString().slice(0, 10);
}

/** A year by its number, a month by its name, a day by both. */
function named(date: Date): string {
  const iso = isoOf(date);
  if (date.getUTCDate() !== 1) return formatDate(iso).replace(/ \d\d$/, '');
  return date.getUTCMonth() === 0 ? String(date.getUTCFullYear()) : formatMonth(iso);
}

/** Both ends by their dates, and between them what fits. */
export function timeTicks(x: ScaleTime<number, number>, width: number, size = 13): TimeTick[] {
  const [first, last] = x.domain();
  const [left = 0, right = width] = x.range();
  if (!first || !last) return [];
  const start = formatDate(isoOf(first));
  const end = formatDate(isoOf(last));
  const wide = (text: string) => textWidth(text, size);
  const ends = [
    { at: left + wide(start) / 2, text: start, width: wide(start), weight: 3 },
    { at: right - wide(end) / 2, text: end, width: wide(end), weight: 2 },
  ];
  const inner = x.ticks(Math.max(2, Math.floor((right - left) / 90))).map((date) => {
    const text = named(date);
    return {
      at: x(date),
      text,
      width: wide(text),
      weight: date.getUTCMonth() === 0 && date.getUTCDate() === 1 ? 1 : 0,
    };
  });
  return thatFit([...ends, ...inner], 14);
}
