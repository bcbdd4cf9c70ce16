/** A text of the draft that a field shows and changes. */
import { draft, edit, editDraft, typed } from '../store/session';
import { valueAt } from '../store/paths';

export interface Binding {
  /** Where it stands in the draft; undo goes back to the field by it. */
  readonly path: string;
  readonly text: string;
  readonly set: (text: string) => void;
}

/** The text at a path of the deal on screen. */
export function bind(path: string): Binding {
  return { path, text: typed(path), set: (text) => edit(path, text) };
}

/** The text at a path of the whole draft, as `analysis/cover/share`. */
export function bindDraft(path: string): Binding {
  const value = valueAt(draft.value, path);
  return { path, text: typeof value === 'string' ? value : '', set: (text) => editDraft(path, text) };
}
