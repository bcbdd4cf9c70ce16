/** Brings the cursor to a field that somebody asked for, or that undo changed: into its place and its card first. */
import { effect, untracked } from '@preact/signals';
import { cardOf } from '../cards/cards';
import { focusBy } from '../fields/focus';
import { fieldWanted, go, place } from '../store/navigation';
import { openCards, toggleCard } from '../store/preferences';
import { draft, touchedByUndo } from '../store/session';

/** After the page has drawn what was opened. */
function afterDrawing(then: () => void): void {
  requestAnimationFrame(() => setTimeout(then, 0));
}

function openCardOf(path: string): void {
  const card = cardOf(path);
  if (card !== null && !openCards.peek().has(card)) toggleCard(card, true);
}

function goToField(pointer: string): void {
  if (place.peek() !== 'quote' && place.peek() !== 'market') go('quote');
  if (pointer.startsWith('/inquiry') && place.peek() === 'market') go('quote');
  openCardOf(pointer);
  afterDrawing(() => focusBy('at', pointer));
}

function goToChanged(path: string): void {
  const [head, market, ...rest] = path.split('/');
  if (head !== 'deals' || market !== draft.peek().current) return;
  const within = rest.join('/');
  afterDrawing(() => focusBy('path', within));
}

export function followWishes(): void {
  effect(() => {
    const wanted = fieldWanted.value;
    if (wanted !== null) untracked(() => goToField(wanted.pointer));
  });
  effect(() => {
    const touched = touchedByUndo.value;
    if (touched !== null) untracked(() => goToChanged(touched.path));
  });
}
