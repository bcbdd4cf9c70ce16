// What is large or deep is answered by the module and the plain script too, whose memory and stack are bounded.
import { describe, expect, test } from 'vitest';
import { openAnswering } from './cores';

const inLists = (depth: number, text: string) => '['.repeat(depth) + text + ']'.repeat(depth);
const isAnswer = (text: string) => expect(JSON.parse(text)).toMatchObject({ format: 'forwright/1', ok: false });

describe.each(['module', 'plain'] as const)('the %s core', (kind) => {
  test('answers a request nested as deep as a request can be long', async () => {
    const answerAll = await openAnswering(kind);
    answerAll([inLists(32, '1'), inLists(33, '1'), inLists(1_000_000, '1'), '['.repeat(1_000_000)]).forEach(isAnswer);
  });

  test('answers requests of 64 MB, and one byte more, and goes on', async () => {
    const limit = 64 * 1024 * 1024;
    const numbers = (size: number) => `[${'1,'.repeat(size / 2 - 1)}1]`.padEnd(size);
    const answerAll = await openAnswering(kind);
    answerAll([
      `"${'x'.repeat(limit - 2)}"`,
      `{"format":"${'x'.repeat(limit - 13)}"}`,
      numbers(limit),
      `${numbers(limit)} `,
      '{}',
    ]).forEach(isAnswer);
  });
});
