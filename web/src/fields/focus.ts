/** Where the cursor goes: on with Enter, to a fault, to what undo changed. */
const fieldSelector = ':is(input, select, textarea):not([disabled], [type="file"], [tabindex="-1"])';

function focusAndSelect(element: HTMLElement): void {
  element.focus();
  if (element instanceof HTMLInputElement && element.type === 'text') element.select();
}

/** The next field of the page after this one; from the last, the first. */
export function goOn(from: HTMLElement): void {
  const fields = [...document.querySelectorAll<HTMLElement>(`main ${fieldSelector}`)].filter(
    (field) =>
      field.getClientRects().length > 0 &&
      !(field instanceof HTMLInputElement && field.type === 'radio' && !field.checked),
  );
  const next = fields[fields.indexOf(from) + 1] ?? fields[0];
  if (next !== undefined) focusAndSelect(next);
}

function fieldBy(attribute: 'at' | 'path', value: string): HTMLElement | null {
  const fields = [...document.querySelectorAll<HTMLElement>(`[data-${attribute}]`)];
  const named = (field: HTMLElement): string => field.dataset[attribute] ?? '';
  const exact = fields.find((field) => named(field) === value);
  const inside = fields.find((field) => named(field).startsWith(`${value}/`));
  const around = fields
    .filter((field) => value.startsWith(`${named(field)}/`))
    .sort((one, two) => named(two).length - named(one).length)[0];
  return exact ?? inside ?? around ?? null;
}

/** Focuses the field of a request member, or of a path of the deal, where one is on screen. */
export function focusBy(attribute: 'at' | 'path', value: string): boolean {
  const field = fieldBy(attribute, value);
  if (field === null) return false;
  field.scrollIntoView({ block: 'nearest' });
  focusAndSelect(field);
  return true;
}
