/** What a text was understood as, or a sentence that says why it was not and what would be right. */
export type Parsed<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly code: string; readonly message: string };

export function understood<T>(value: T): Parsed<T> {
  return { ok: true, value };
}

export function notUnderstood(code: string, message: string): Parsed<never> {
  return { ok: false, code, message };
}
