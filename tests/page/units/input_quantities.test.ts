import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readNumber, type NumberKind } from '../../../web/src/input/quantities';

function read(text: string, kind: NumberKind, sign: '.' | ',' = '.'): number | string {
  const parsed = readNumber(text, kind, sign);
  return parsed.ok ? parsed.value : parsed.code;
}

describe('numbers with their units', () => {
  test.each([
    ['1.5mn', 'amount', 1_500_000],
    ['1.5 mn', 'amount', 1_500_000],
    ['1.5MN', 'amount', 1_500_000],
    ['25k', 'amount', 25_000],
    ['2bn', 'amount', 2_000_000_000],
    ['10,000', 'amount', 10_000],
    ['3', 'percent', 0.03],
    ['3%', 'percent', 0.03],
    ['3 %', 'percent', 0.03],
    ['300bp', 'percent', 0.03],
    ['3.1', 'percent', 0.031],
    ['12', 'basis-points', 0.0012],
    ['12bp', 'basis-points', 0.0012],
    ['0.12%', 'basis-points', 0.0012],
    ['-10', 'basis-points', -0.001],
    ['5', 'margin-points', 5],
    ['5bp', 'margin-points', 5],
    ['0.05%', 'margin-points', 5],
    ['99.95', 'price', 99.95],
    ['2', 'count', 2],
    ['0', 'count', 0],
    ['2.0', 'count', 2],
  ] as const)('%s as %s', (text, kind, value) => {
    expect(read(text, kind)).toBe(value);
  });

  test('a decimal comma is understood by locale and, where it can be nothing else, without', () => {
    expect(read('1,5mn', 'amount', ',')).toBe(1_500_000);
    expect(read('1,5mn', 'amount', '.')).toBe(1_500_000);
    expect(read('2,75', 'percent', '.')).toBe(0.0275);
  });

  test('a bare m in an amount is a question that says what to write', () => {
    for (const text of ['1.5m', '1.5M', '1.5 m']) {
      const parsed = readNumber(text, 'amount', '.');
      expect(parsed).toEqual({
        ok: false,
        code: 'ambiguous-m',
        message: 'm could be million: write 1.5mn, or 1.5k for thousand.',
      });
    }
  });

  test.each([
    ['3x', 'amount', 'unknown-suffix'],
    ['3k', 'percent', 'unknown-suffix'],
    ['3bp', 'amount', 'unknown-suffix'],
    ['1.5', 'count', 'not-whole'],
    ['1e400', 'price', 'too-large'],
    ['9e308k', 'amount', 'too-large'],
    ['three', 'price', 'not-a-number'],
    ['%', 'percent', 'not-a-number'],
  ] as const)('%s as %s is refused', (text, kind, code) => {
    expect(read(text, kind)).toBe(code);
  });

  test('no text makes it throw, and what is read is finite', () => {
    const kinds = ['amount', 'price', 'percent', 'basis-points', 'margin-points', 'plain', 'count'] as const;
    fc.assert(
      fc.property(fc.string(), fc.constantFrom(...kinds), fc.constantFrom('.', ','), (text, kind, sign) => {
        const parsed = readNumber(text, kind, sign as '.' | ',');
        return !parsed.ok || Number.isFinite(parsed.value);
      }),
      { seed: 20261201 },
    );
  });
});
