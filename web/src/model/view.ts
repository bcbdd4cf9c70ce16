/**
 * All that a view may read and do. Components take no other route to the person's input or to the core: they read
 * these signals and call these functions.
 *
 * Data flows one way: text typed → parsed → draft → request → core → answer → these signals → views.
 */
import type { ReadonlySignal } from '@preact/signals';
import type { Assumed, PathResult, QuoteResult, Remark } from './answer';
import type { QuoteRequest } from './request';
import {
  beforeSwitch,
  coreTrouble as trouble,
  faults,
  pathShown,
  preferences,
  quoteSettled,
  quoteShown,
} from '../store/signals';

export type * from './answer';
export type { QuoteRequest } from './request';
export { focusField, go, panel, panels, place, places, showPanel } from '../store/navigation';
export type { Panel, Place } from '../store/navigation';

/** An answer that was good, with the request it answers (names, currency, kind, client, quantity are read from there). */
export interface Good<Result> {
  readonly request: QuoteRequest;
  readonly result: Result;
  readonly notices: readonly Remark[];
  readonly assumed: readonly Assumed[];
}

/** The last good answer. */
export interface Shown<Result> {
  /** None until the first good answer. */
  readonly good: Good<Result> | null;
  /** The input has changed and the new one has no good answer: show it greyed, and say so in words. */
  readonly stale: boolean;
  /** An answer is on its way and late (never set for a moment only: no flicker). */
  readonly busy: boolean;
}

/** What is wrong at a member of the request, in the core's own sentence, or the page's where the text is not readable. */
export interface Fault {
  readonly at: string;
  readonly code: string;
  readonly message: string;
}

/** The quote as it stood before funding was switched, so that the change can be shown; null when nothing was switched. */
export interface Previous {
  readonly request: QuoteRequest;
  readonly result: QuoteResult;
  /** What it was, in a few words: `flat`, `curve`, `Vasicek`, … */
  readonly was: string;
  /** What it is now. */
  readonly now: string;
}

export interface Preferences {
  /** BCP 47, for dates and number grouping. */
  readonly locale: string;
  /** The decimal sign of the person's numbers. */
  readonly decimal: '.' | ',';
}

/** The quote on screen. */
export const quoteAnswer: ReadonlySignal<Shown<QuoteResult>> = quoteShown;
/** The same a moment later, once the price itself is painted: for pictures and proofs, which take longer to draw. */
export const settledAnswer: ReadonlySignal<Shown<QuoteResult>> = quoteSettled;
/** The forward by delivery date, for the chart; it may come a little later than the quote. */
export const pathAnswer: ReadonlySignal<Shown<PathResult>> = pathShown;
/** What is wrong in the request as typed, by JSON pointer. */
export const errors: ReadonlySignal<ReadonlyMap<string, Fault>> = faults;
/** What the quote was before funding was switched. */
export const previous: ReadonlySignal<Previous | null> = beforeSwitch;
/** How the person writes and reads numbers and dates. */
export const format: ReadonlySignal<Preferences> = preferences;
/** A sentence where no core can run in this browser; else null. */
export const coreTrouble: ReadonlySignal<string | null> = trouble;
