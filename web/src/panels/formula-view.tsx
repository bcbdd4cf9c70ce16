import { h } from 'preact';
import type { ComponentChildren } from 'preact';
import { readFormula } from './formula';
import type { MathNode } from './formula';

function drawn({ tag, text, children, low }: MathNode, key: number): ComponentChildren {
  return h(tag, low ? { key, stretchy: 'false' } : { key }, ...(children ? children.map(drawn) : [text ?? '']));
}

/** A formula of the core set as mathematics, at its full size where it stands alone; as its text where it cannot be read. */
export function Formula({ text, alone = false }: { readonly text: string; readonly alone?: boolean }) {
  const root = readFormula(text);
  if (!root) return <span class="formula">{text}</span>;
  return <math displaystyle={alone}>{drawn(root, 0)}</math>;
}
