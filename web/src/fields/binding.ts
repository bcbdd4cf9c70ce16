/** A text of the draft that a field shows and changes. */
import { edit, typed } from '../store/session';

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
