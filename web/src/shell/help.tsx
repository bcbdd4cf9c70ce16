import { signal } from '@preact/signals';
import { useEffect, useRef } from 'preact/hooks';
import { places } from '../model/view';
import { placeNames } from './header';

export const helpOpen = signal(false);

const keys: readonly (readonly [string, string])[] = [
  ...places.map((name, index) => [`${index + 1} or Alt+${index + 1}`, placeNames[name]] as const),
  ['Enter', 'on to the next field'],
  ['↑ ↓', 'step a number, a date by a day, a tenor'],
  ['Shift+↑ ↓', 'ten steps; a date by a month'],
  ['Ctrl+Z', 'undo'],
  ['Ctrl+Shift+Z', 'redo'],
  ['Alt+G', 'give this quote: it goes into the book'],
  ['Ctrl+S', 'save everything to a file'],
  ['Ctrl+P', 'print the quote'],
  ['?', 'these keys'],
];
const writings: readonly (readonly [string, string])[] = [
  ['25k, 1.5mn, 2bn', 'thousand, million, billion'],
  ['12bp, 0.12%', 'basis points and per cent, in any rate'],
  ['18 Jun 27, 18.6.27, 2027-06-18', 'a date'],
  ['3M, 2w, 1 year', 'a tenor'],
];

function List({ rows }: { readonly rows: readonly (readonly [string, string])[] }) {
  return (
    <dl class="keys">
      {rows.map(([key, what]) => (
        <div key={key}>
          <dt>{key}</dt>
          <dd>{what}</dd>
        </div>
      ))}
    </dl>
  );
}

/** The keys and ways of writing, in reach of one key. */
export function Help() {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    if (helpOpen.value) dialog.current?.showModal();
    else dialog.current?.close();
  }, [helpOpen.value]);
  return (
    <dialog ref={dialog} aria-labelledby="help-name" onClose={() => (helpOpen.value = false)}>
      <form method="dialog">
        <h2 id="help-name">Keys</h2>
        <List rows={keys} />
        <h2>How to write</h2>
        <List rows={writings} />
        <div class="row">
          <button class="primary">Close</button>
        </div>
      </form>
    </dialog>
  );
}
