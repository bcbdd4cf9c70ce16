/** The module has something that the translation does not know, which its message names. */
export class NotTranslated extends Error {}

/** What a module that is well made has at this place. */
export function present<Value>(value: Value | undefined): Value {
  if (value === undefined) throw new NotTranslated('The module is not well made.');
  return value;
}
