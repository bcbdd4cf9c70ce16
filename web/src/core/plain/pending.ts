/** What a value that is not computed yet depends on: variables by name, memory, what functions may change. */
export const memory = 'memory';
export const globals = 'globals';

/** A value on the stack, as the text that computes it; it is used once. */
export interface Pending {
  readonly text: string;
  /** The same as a condition, true or false, where the value is 1 or 0. */
  readonly condition?: string;
  readonly uses: ReadonlySet<string>;
}

const nothing: ReadonlySet<string> = new Set();

export const constant = (text: string): Pending => ({ text, uses: nothing });

export function variable(name: string): Pending {
  return { text: name, uses: new Set([name]) };
}

export function together(operands: readonly Pending[], also?: string): ReadonlySet<string> {
  const using = operands.filter(({ uses }) => uses.size > 0);
  if (also === undefined && using.length < 2) return using[0]?.uses ?? nothing;
  const all = new Set(also === undefined ? [] : [also]);
  for (const { uses } of using) for (const name of uses) all.add(name);
  return all;
}

export const asCondition = ({ text, condition }: Pending): string => condition ?? text;
