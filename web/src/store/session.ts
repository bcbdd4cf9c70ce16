/** What the person has typed, with its history: the one place that is written to, and the deal on screen read from it. */
import { computed, signal, type ReadonlySignal } from '@preact/signals';
import type { DealDraft, Draft } from '../model/draft';
import { emptyAnalysis, emptyDeal } from '../model/draft';
import { advance, back, begin, forth, type History } from './history';
import { valueAt, withValue } from './paths';

/** Changes at one place that follow each other faster than this are one step to undo. */
const joinedWithinMilliseconds = 1000;

const nothing: Draft = { current: '', deals: {}, tenors: { maturities: '' }, analysis: emptyAnalysis, agreed: [] };
const history = signal<History<Draft>>(begin(nothing));
let lastEdit = 0;

export const draft = computed(() => history.value.present);
export const deal = computed<DealDraft>(() => draft.value.deals[draft.value.current] ?? emptyDeal);
export const canUndo = computed(() => history.value.past.length > 0);
export const canRedo = computed(() => history.value.future.length > 0);

/** The place that undo or redo touched last, to go back to. */
export const touchedByUndo = signal<{ readonly path: string; readonly serial: number } | null>(null);

/** Starts anew from a draft, with nothing to undo. */
export function startFrom(value: Draft): void {
  history.value = begin(value);
}

/** Replaces the whole draft, as one step that can be undone. */
export function replaceDraft(value: Draft, touched: string): void {
  history.value = advance(history.peek(), value, touched, false);
  lastEdit = 0;
}

/** Puts a value at a path of the whole draft; typing on at one place is one step to undo. */
export function editDraft(path: string, value: unknown): void {
  const { present } = history.peek();
  if (valueAt(present, path) === value) return;
  const now = performance.now();
  history.value = advance(
    history.peek(),
    withValue(present, path, value),
    path,
    typeof value === 'string' && now - lastEdit < joinedWithinMilliseconds,
  );
  lastEdit = now;
}

function dealPath(path: string): string {
  return `deals/${draft.peek().current}/${path}`;
}

/** Puts a value at a path of the deal on screen, as `market/spot/bid`. */
export function edit(path: string, value: unknown): void {
  editDraft(dealPath(path), value);
}

export const inquiry = computed(() => deal.value.inquiry);
export const market = computed(() => deal.value.market);

const watched = new Map<string, ReadonlySignal<unknown>>();

/** What stands at a path of the deal on screen. Who reads it is told when it changes, and of nothing else. */
export function valueOf(path: string): unknown {
  let value = watched.get(path);
  if (value === undefined) {
    value = computed(() => valueAt(deal.value, path));
    watched.set(path, value);
  }
  return value.value;
}

/** The text at a path of the deal on screen; empty where there is none (yet). */
export function typed(path: string): string {
  const value = valueOf(path);
  return typeof value === 'string' ? value : '';
}

export function undo(): void {
  const touched = history.peek().past.at(-1)?.touched;
  history.value = back(history.peek());
  remember(touched);
}

export function redo(): void {
  const touched = history.peek().future[0]?.touched;
  history.value = forth(history.peek());
  remember(touched);
}

function remember(path: string | undefined): void {
  lastEdit = 0;
  if (path !== undefined) touchedByUndo.value = { path, serial: (touchedByUndo.peek()?.serial ?? 0) + 1 };
}
