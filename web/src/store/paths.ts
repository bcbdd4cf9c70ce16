/** Reading and replacing one value in a tree that is never changed in place, by a path such as `market/spot/bid`. */
type Tree = Readonly<Record<string, unknown>> | readonly unknown[];

function step(tree: unknown, name: string): unknown {
  return (tree as Readonly<Record<string, unknown>> | undefined)?.[name];
}

export function valueAt(tree: unknown, path: string): unknown {
  return path.split('/').reduce(step, tree);
}

/** The tree with `value` at `path`, everything beside the path shared with the old one. */
export function withValue<T>(tree: T, path: string, value: unknown): T {
  return replaced(tree as Tree, path.split('/'), value) as T;
}

function replaced(tree: Tree, names: readonly string[], value: unknown): Tree {
  const [name, ...rest] = names;
  if (name === undefined) return tree;
  const inner = rest.length === 0 ? value : replaced(step(tree, name) as Tree, rest, value);
  if (Array.isArray(tree)) return tree.map((item: unknown, index) => (String(index) === name ? inner : item));
  return { ...(tree as Readonly<Record<string, unknown>>), [name]: inner };
}
