/** The keys of the whole page. Plain keys work outside fields only; with Alt or Ctrl they work everywhere. */
import { save } from '../files/open-save';
import { askToPrint } from '../print/options';
import { go, places } from '../store/navigation';
import { redo, undo } from '../store/session';
import { giveQuote } from '../book/book';
import { helpOpen } from './help';

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement &&
    target.matches('input:not([type="radio"], [type="checkbox"]), select, textarea, [contenteditable]')
  );
}

function digitOf(event: KeyboardEvent): number {
  return Number(/^Digit([1-5])$/.exec(event.code)?.[1] ?? 0);
}

function onCommand(event: KeyboardEvent): boolean {
  const key = event.key.toLowerCase();
  if (key === 'z' && event.shiftKey) redo();
  else if (key === 'z') undo();
  else if (key === 'y') redo();
  else if (key === 's') save();
  else if (key === 'p') askToPrint();
  else return false;
  return true;
}

function onAlt(event: KeyboardEvent): boolean {
  const place = places[digitOf(event) - 1];
  if (place !== undefined) go(place);
  else if (event.code === 'KeyG') void giveQuote();
  else return false;
  return true;
}

function onPlain(event: KeyboardEvent): boolean {
  const place = places[digitOf(event) - 1];
  if (event.key === '?') helpOpen.value = true;
  else if (place !== undefined && !event.shiftKey) go(place);
  else return false;
  return true;
}

export function listenToKeys(): void {
  document.addEventListener('keydown', (event) => {
    if (event.isComposing || event.defaultPrevented) return;
    const command = event.ctrlKey || event.metaKey;
    const taken =
      command && !event.altKey
        ? onCommand(event)
        : event.altKey && !command
          ? onAlt(event)
          : !command && !isTyping(event.target) && onPlain(event);
    if (taken) event.preventDefault();
  });
}
