/** What is typed survives closing: kept in this browser, under a name with the version of its form. */
import { effect, signal } from '@preact/signals';
import type { Draft } from '../model/draft';
import { draft } from '../store/session';
import { preferences } from '../store/signals';
import { parseJson, readState, writeState } from './state';

const storageName = 'forwright.state.1';
const restMilliseconds = 300;

/** A sentence where this browser does not keep what is typed. */
export const notKept = signal<string | null>(null);

/** What was kept; null where there is nothing, or nothing that can be read: that is set aside, and said. */
export function keptDraft(): Draft | null {
  try {
    const text = localStorage.getItem(storageName);
    if (text === null) return null;
    const parsed = parseJson(text);
    const state = parsed.ok ? readState(parsed.value, preferences.peek().decimal) : parsed;
    if (state.ok) return state.value;
    localStorage.setItem(`${storageName}.unread`, text);
    notKept.value = `What was typed here before could not be read and is set aside. ${state.message}`;
    return null;
  } catch {
    return null;
  }
}

function keep(value: Draft): void {
  try {
    localStorage.setItem(storageName, writeState(value, preferences.peek().decimal));
    notKept.value = null;
  } catch {
    notKept.value = 'This browser does not keep what you type here: save it to a file before you close the page.';
  }
}

/** Keeps every change once typing rests, and at once when the page is left. */
export function keepDraft(): void {
  let waiting: ReturnType<typeof setTimeout> | undefined;
  let latest: Draft | null = null;
  const now = (): void => {
    clearTimeout(waiting);
    if (latest !== null) keep(latest);
    latest = null;
  };
  let first = true;
  effect(() => {
    latest = draft.value;
    if (first) {
      first = false;
      latest = null;
      return;
    }
    clearTimeout(waiting);
    waiting = setTimeout(now, restMilliseconds);
  });
  addEventListener('pagehide', now);
  document.addEventListener('visibilitychange', now);
}
