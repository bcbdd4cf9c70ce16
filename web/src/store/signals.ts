/** What the page shows, as signals. The store alone writes them; everything else reads them through `model/view.ts`. */
import { signal } from '@preact/signals';
import type { PathResult, QuoteResult } from '../model/answer';
import type { Fault, Preferences, Previous, Shown } from '../model/view';

const nothing = { good: null, stale: false, busy: false } as const;

export const quoteShown = signal<Shown<QuoteResult>>(nothing);
/** The quote once more, after the price itself is painted: for what takes longer to draw. */
export const quoteSettled = signal<Shown<QuoteResult>>(nothing);
export const pathShown = signal<Shown<PathResult>>(nothing);
export const faults = signal<ReadonlyMap<string, Fault>>(new Map());
export const beforeSwitch = signal<Previous | null>(null);
export const preferences = signal<Preferences>({ locale: 'en-GB', decimal: '.' });
/** A sentence where the core cannot run at all in this browser. */
export const coreTrouble = signal<string | null>(null);
/** What the core runs as; empty until it is open. */
export const coreKind = signal<'' | 'module' | 'plain'>('');
/** The version that the core says it has; empty until it is open. */
export const coreVersion = signal('');
