import { readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** What an answer must hold at a place. */
export interface Expectation {
  /** RFC 6901 pointer into the answer. */
  readonly at: string;
  /** A number within the tolerance, or anything else exactly; `{"absent": true}` where nothing may stand there. */
  readonly value: unknown;
  /** Largest difference of a number; left out, none at all. */
  readonly tolerance?: number;
  /** Where the value is from, if not from where the case is. */
  readonly source?: string;
}

/** One row of the golden table. */
export interface GoldenCase {
  readonly name: string;
  /** Where the expected values are from: a publication, a statute, independent arithmetic. */
  readonly source: string;
  /** The request, or its text where it is no JSON or not JSON as it is usually written. */
  readonly request?: Record<string, unknown>;
  readonly text?: string;
  readonly expect: readonly Expectation[];
}

const folder = fileURLToPath(new URL('../golden/', import.meta.url));

/** Every case of every file of tests/golden: {"cases": [GoldenCase, …]}. */
export function goldenCases(): GoldenCase[] {
  return readdirSync(folder)
    .filter((file) => file.endsWith('.json'))
    .sort()
    .flatMap((file) => {
      const { cases } = JSON.parse(readFileSync(folder + file, 'utf8')) as { cases?: GoldenCase[] };
      if (!Array.isArray(cases)) throw new Error(`tests/golden/${file} has no list "cases".`);
      return cases.map((row) => ({ ...row, name: `${file.replace(/\.json$/, '')}: ${row.name}` }));
    });
}

/** The text that the cores are given. */
export function requestText({ name, request, text }: GoldenCase): string {
  if ((request === undefined) === (text === undefined)) {
    throw new Error(`${name} must have either "request" or "text".`);
  }
  return text ?? JSON.stringify(request);
}

/** What stands at a pointer (RFC 6901); nothing where nothing does. */
export function found(document: unknown, pointer: string): unknown {
  return pointer
    .split('/')
    .slice(1)
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .reduce<unknown>(
      (value, part) =>
        typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[part] : undefined,
      document,
    );
}
