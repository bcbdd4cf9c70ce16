/** One quote given: the request and the answer as they were, letter for letter, and a seal over both. */
import { fingerprint } from './fingerprint';

export interface QuoteRecord {
  readonly id: string;
  /** The person's clock when it was given, ISO 8601. */
  readonly givenAt: string;
  readonly version: string;
  readonly request: string;
  readonly answer: string;
  /** The seal of the record before it, so that taking one out shows too; empty for the first. */
  readonly before: string;
  readonly seal: string;
}

export type Unsealed = Omit<QuoteRecord, 'seal'>;

export async function seal(record: Unsealed): Promise<string> {
  const { id, givenAt, version, request, answer, before } = record;
  return fingerprint(JSON.stringify([id, givenAt, version, request, answer, before]));
}

export interface Verdict {
  /** Whether the record is as it was written. */
  readonly intact: boolean;
  /** Whether the core gives the same answer again, in every digit. */
  readonly sameAgain: boolean;
  /** Where it differs first, where it does. */
  readonly difference: string | null;
}

/** Where two answers differ first, in words. */
export function firstDifference(one: string, two: string): string | null {
  if (one === two) return null;
  let at = 0;
  while (at < one.length && one[at] === two[at]) ++at;
  const around = (text: string): string => text.slice(Math.max(0, at - 24), at + 24);
  return `… ${around(one)} … is now … ${around(two)} …`;
}

export async function judge(record: QuoteRecord, ask: (request: string) => Promise<string>): Promise<Verdict> {
  const intact = (await seal(record)) === record.seal;
  const again = await ask(record.request);
  return { intact, sameAgain: again === record.answer, difference: firstDifference(record.answer, again) };
}
