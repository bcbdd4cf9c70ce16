/** What was, so that everything can be undone and redone. Values are shared between the steps, so they cost little. */
export interface Moment<T> {
  readonly value: T;
  /** What the change to the next moment touched: a path of the draft. */
  readonly touched: string;
}

export interface History<T> {
  readonly past: readonly Moment<T>[];
  readonly present: T;
  readonly future: readonly Moment<T>[];
}

const longest = 500;

export function begin<T>(value: T): History<T> {
  return { past: [], present: value, future: [] };
}

/** The next value. Where `joined`, it goes on from the last change at the same place, which is undone together with it. */
export function advance<T>(history: History<T>, value: T, touched: string, joined: boolean): History<T> {
  const last = history.past.at(-1);
  const past =
    joined && last?.touched === touched && history.future.length === 0
      ? history.past
      : [...history.past, { value: history.present, touched }].slice(-longest);
  return { past, present: value, future: [] };
}

export function back<T>(history: History<T>): History<T> {
  const last = history.past.at(-1);
  if (last === undefined) return history;
  return {
    past: history.past.slice(0, -1),
    present: last.value,
    future: [{ value: history.present, touched: last.touched }, ...history.future],
  };
}

export function forth<T>(history: History<T>): History<T> {
  const [next, ...future] = history.future;
  if (next === undefined) return history;
  return {
    past: [...history.past, { value: history.present, touched: next.touched }],
    present: next.value,
    future,
  };
}
