/** What a value read from a file must look like, and the first place where it does not. */
export type Shape =
  | 'text'
  | 'number'
  | 'flag'
  | { readonly oneOf: readonly string[] }
  | { readonly list: Shape }
  | { readonly named: Shape }
  | { readonly members: Readonly<Record<string, Shape>> }
  /** What earlier versions did not have yet, and what stands for it where it is not there. */
  | { readonly added: Shape; readonly before: unknown };

/** A sentence about the first misfit, or null where the value has the shape. */
export function misfit(value: unknown, shape: Shape, at = ''): string | null {
  const place = at === '' ? 'The whole' : at;
  if (shape === 'text') return typeof value === 'string' ? null : `${place} should be a text.`;
  if (shape === 'number') return Number.isSafeInteger(value) ? null : `${place} should be a whole number.`;
  if (shape === 'flag') return typeof value === 'boolean' ? null : `${place} should be true or false.`;
  if ('added' in shape) return value === undefined ? null : misfit(value, shape.added, at);
  if ('oneOf' in shape)
    return typeof value === 'string' && shape.oneOf.includes(value)
      ? null
      : `${place} should be one of ${shape.oneOf.map((word) => (word === '' ? 'empty' : word)).join(', ')}.`;
  if ('list' in shape) {
    if (!Array.isArray(value)) return `${place} should be a list.`;
    return firstOf(value.map((item, index) => [String(index), item, shape.list]));
  }
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return `${place} should be an object.`;
  if ('named' in shape) return firstOf(Object.entries(value).map(([name, item]) => [name, item, shape.named]));
  const unknown = Object.keys(value).find((name) => !(name in shape.members));
  if (unknown !== undefined) return `${at}/${unknown} is not known.`;
  return firstOf(
    Object.entries(shape.members).map(([name, inner]) => [name, (value as Record<string, unknown>)[name], inner]),
  );

  function firstOf(inner: readonly (readonly [string, unknown, Shape])[]): string | null {
    for (const [name, item, itsShape] of inner) {
      const wrong = misfit(item, itsShape, `${at}/${name}`);
      if (wrong !== null) return wrong;
    }
    return null;
  }
}

/** A value that has the shape, with what an earlier version did not have yet. */
export function completed(value: unknown, shape: Shape): unknown {
  if (typeof shape === 'string' || 'oneOf' in shape) return value;
  if ('added' in shape) return value === undefined ? shape.before : completed(value, shape.added);
  if ('list' in shape) return (value as readonly unknown[]).map((item) => completed(item, shape.list));
  const inner = value as Readonly<Record<string, unknown>>;
  if ('named' in shape)
    return Object.fromEntries(Object.entries(inner).map(([name, item]) => [name, completed(item, shape.named)]));
  return Object.fromEntries(
    Object.entries(shape.members).map(([name, itsShape]) => [name, completed(inner[name], itsShape)]),
  );
}
