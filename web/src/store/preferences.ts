/** How the person writes numbers and dates, which cards stand open: of this browser, not of the work. */
import { signal } from '@preact/signals';
import type { Preferences } from '../model/view';
import { preferences } from './signals';

const storageName = 'forwright.preferences.1';

export const openCards = signal<ReadonlySet<string>>(new Set());
/** The person's own choice of decimal sign; null follows the locale. */
export const chosenDecimal = signal<Preferences['decimal'] | null>(null);

function decimalOf(locale: string): Preferences['decimal'] {
  const parts = new Intl.NumberFormat(locale).formatToParts(1.5);
  return parts.find((part) => part.type === 'decimal')?.value === ',' ? ',' : '.';
}

export function toggleCard(name: string, open: boolean): void {
  const cards = new Set(openCards.peek());
  if (open) cards.add(name);
  else cards.delete(name);
  openCards.value = cards;
  keepPreferences();
}

export function keepPreferences(): void {
  try {
    localStorage.setItem(
      storageName,
      JSON.stringify({ openCards: [...openCards.peek()], decimal: chosenDecimal.peek() }),
    );
  } catch {
    // A browser that keeps nothing still works.
  }
}

/** Takes the person's language from the browser and what was chosen earlier. */
export function readPreferences(): void {
  const [locale = 'en-GB'] = navigator.languages;
  try {
    const kept = JSON.parse(localStorage.getItem(storageName) ?? '{}') as { openCards?: unknown; decimal?: unknown };
    if (Array.isArray(kept.openCards))
      openCards.value = new Set(kept.openCards.filter((name): name is string => typeof name === 'string'));
    if (kept.decimal === '.' || kept.decimal === ',') chosenDecimal.value = kept.decimal;
  } catch {
    // What cannot be read is as good as nothing kept.
  }
  preferences.value = { locale, decimal: chosenDecimal.peek() ?? decimalOf(locale) };
}
