// The golden table: every request goes through the program, the module and the plain script, whose answers must be
// the same bytes; the answer holds what the table expects, and request and answer obey the JSON Schema.
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';
import { beforeAll, describe, expect, test } from 'vitest';
import { everyCore, schema } from './cores';
import { found, goldenCases, requestText, type Expectation } from './golden';

const cases = goldenCases();
const requests = cases.map(requestText);

function expectHeld(answer: unknown, { at, value, tolerance }: Expectation): void {
  const actual = found(answer, at);
  if (typeof value === 'number') {
    expect(actual, at).toBeTypeOf('number');
    expect(Math.abs((actual as number) - value), `${at} is ${actual}, not ${value}`).toBeLessThanOrEqual(
      tolerance ?? 0,
    );
  } else if (typeof value === 'object' && value !== null && 'absent' in value) {
    expect(actual, at).toBeUndefined();
  } else {
    expect(actual, at).toEqual(value);
  }
}

describe('the golden table', () => {
  let answers: Record<string, string[]>;
  let obeys: ValidateFunction;

  beforeAll(async () => {
    answers = Object.fromEntries(
      Object.entries(await everyCore()).map(([core, answerAll]) => [core, answerAll(requests)]),
    );
    obeys = new Ajv2020({
      strict: true,
      strictTypes: false,
      strictRequired: false,
      allErrors: true,
      validateFormats: false,
    }).compile(schema());
  });

  test('has at least 100 cases, each of its own name', () => {
    expect(cases.length).toBeGreaterThanOrEqual(100);
    expect(new Set(cases.map(({ name }) => name)).size).toBe(cases.length);
  });

  test.each(cases.map((row, index) => ({ ...row, index })))('$name', ({ index, request, source, expect: expected }) => {
    const text = answers.program![index]!;
    expect(answers.module![index], "the module's answer").toBe(text);
    expect(answers['plain script']![index], "the plain script's answer").toBe(text);

    const answer = JSON.parse(text) as { ok: boolean };
    expect(obeys(answer), `the answer against the schema: ${JSON.stringify(obeys.errors)}`).toBe(true);
    if (answer.ok) {
      expect(obeys(request), `the request against the schema: ${JSON.stringify(obeys.errors)}`).toBe(true);
    }

    expect(source, 'the source').toMatch(/\S/);
    expect(expected.length, 'what is expected').toBeGreaterThan(0);
    for (const expectation of expected) expectHeld(answer, expectation);
  });
});
