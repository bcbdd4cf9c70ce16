/** The carry path as drawn: what the core answered, with the distributions' steps made upright. */
import { timeOf } from '../format';
import type { PathResult } from '../model/view';

export interface PathPoint {
  readonly time: number;
  readonly date: string;
  readonly fair: number;
  readonly bid: number;
  readonly offer: number;
}

export interface PathStep {
  readonly time: number;
  readonly date: string;
  readonly change: number;
}

/** The steps by day; two distributions on one day are one step. */
export function stepsByDay({ steps }: PathResult): PathStep[] {
  const byDay = new Map<string, number>();
  for (const { date, change } of steps) byDay.set(date, (byDay.get(date) ?? 0) + change);
  return [...byDay].map(([date, change]) => ({ time: timeOf(date), date, change }));
}

/**
 * The points to join. On the day of a distribution the value of the day before is drawn up to the day, and then the
 * day's own: the fall stands upright, as it happens at once.
 */
export function outline(path: PathResult): PathPoint[] {
  const stepDays = new Set(path.steps.map(({ date }) => date));
  return path.points.flatMap((point, i) => {
    const time = timeOf(point.date);
    const own = { ...point, time };
    const before = path.points[i - 1];
    return before && stepDays.has(point.date) ? [{ ...before, date: point.date, time }, own] : [own];
  });
}

/** The point nearest in time. */
export function nearest(points: PathResult['points'], time: number): number {
  let best = 0;
  points.forEach((point, i) => {
    const known = points[best];
    if (known && Math.abs(timeOf(point.date) - time) < Math.abs(timeOf(known.date) - time)) best = i;
  });
  return best;
}

/** The rows worth reading in a table: the ends, the first point of each month, the days of steps and the ones before. */
export function tableRows(path: PathResult): PathResult['points'][number][] {
  const stepDays = new Set(path.steps.map(({ date }) => date));
  const last = path.points.length - 1;
  return path.points.filter((point, i) => {
    const month = point.date.slice(0, 7);
    const next = path.points[i + 1];
    return (
      i === last ||
      path.points[i - 1]?.date.slice(0, 7) !== month ||
      stepDays.has(point.date) ||
      (next !== undefined && stepDays.has(next.date))
    );
  });
}

/** Of labels wished for, those that fit beside each other, the heaviest first; `at` and `width` in pixels. */
export function thatFit<T extends { readonly at: number; readonly width: number; readonly weight: number }>(
  labels: readonly T[],
  gap: number,
): T[] {
  const kept: T[] = [];
  for (const label of [...labels].sort((a, b) => b.weight - a.weight)) {
    if (kept.every((other) => Math.abs(other.at - label.at) >= (other.width + label.width) / 2 + gap)) kept.push(label);
  }
  return kept;
}
