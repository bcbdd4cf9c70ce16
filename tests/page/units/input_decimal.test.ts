import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { add, fromNumber, numberToText, readDecimal, toNumber, toText } from '../../../web/src/input/decimal';

const seed = 20261201;
const signs = ['.', ','] as const;

function read(text: string, sign: '.' | ',', ask = false): number | string {
  const parsed = readDecimal(text, sign, ask);
  return parsed.ok ? toNumber(parsed.value) : parsed.code;
}

describe('a decimal number as typed', () => {
  test.each([
    ['1234.5', '.', 1234.5],
    ['1234,5', ',', 1234.5],
    ['1,234.5', '.', 1234.5],
    ['1.234,5', ',', 1234.5],
    ['10 000', '.', 10000],
    ['10\u00a0000', ',', 10000],
    ['10\u202f000,25', ',', 10000.25],
    ["10'000.25", '.', 10000.25],
    ['1,234,567', '.', 1234567],
    ['-0,59', '.', -0.59],
    ['-0.59', ',', -0.59],
    ['−0,59', ',', -0.59],
    ['+3', '.', 3],
    ['.5', '.', 0.5],
    ['5.', '.', 5],
    ['0,590', '.', 0.59],
    ['2e-4', '.', 0.0002],
    ['007', '.', 7],
  ] as const)('%s with %s', (text, sign, value) => {
    expect(read(text, sign)).toBe(value);
  });

  test.each(['', 'abc', '1.2.3', '1,23,4', '10 00', '--3', '3 4', '1e', 'NaN', 'Infinity', '0x10'])(
    '%s is none',
    (text) => {
      expect(read(text, '.')).toBe('not-a-number');
    },
  );

  test('what may be thousands or decimals is a question where it matters, and thousands where it does not', () => {
    expect(read('1,234', '.', true)).toBe('ambiguous-number');
    expect(read('1.234', ',', true)).toBe('ambiguous-number');
    expect(read('1,234', '.')).toBe(1234);
    expect(read('1,234.0', '.', true)).toBe(1234);
    expect(read('1,234,567', '.', true)).toBe(1234567);
    expect(read('1.234', '.', true)).toBe(1.234);
  });

  test('the text of any double reads back as the same double, whatever the sign and however far the point is moved', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e15, max: 1e15 }),
        fc.constantFrom(...signs),
        fc.integer({ min: 0, max: 4 }),
        (value, sign, places) => {
          const parsed = readDecimal(numberToText(value, sign, places), sign);
          return parsed.ok && Object.is(toNumber(parsed.value, -places) + 0, value + 0);
        },
      ),
      { seed },
    );
  });

  test('per cent is a hundredth exactly: the nearest double of the shifted digits', () => {
    fc.assert(
      fc.property(fc.integer({ min: -999_999, max: 999_999 }), (tenThousandths) => {
        const text = (tenThousandths / 10_000).toFixed(4);
        const parsed = readDecimal(text, '.');
        return parsed.ok && toNumber(parsed.value, -2) + 0 === Number(`${tenThousandths}e-6`) + 0;
      }),
      { seed },
    );
    const parsed = readDecimal('3.1', '.');
    expect(parsed.ok && toNumber(parsed.value, -2)).toBe(0.031);
  });

  test('sums are exact', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer(), fc.integer({ min: 0, max: 6 }), (one, two, decimals) => {
        const made = (whole: number) => ({
          negative: whole < 0,
          digits: String(Math.abs(whole)),
          exponent: -decimals,
        });
        const sum = toNumber(add(made(one), made(two))) + 0;
        return sum === Number(`${BigInt(one) + BigInt(two)}e-${decimals}`) + 0;
      }),
      { seed },
    );
  });

  test('no text makes it throw', () => {
    fc.assert(
      fc.property(fc.string(), fc.constantFrom(...signs), fc.boolean(), (text, sign, ask) => {
        readDecimal(text, sign, ask);
      }),
      { seed },
    );
  });

  test('trailing zeros are kept only where asked for', () => {
    expect(toText(fromNumber(1.5), '.', 0, 2)).toBe('1.50');
    expect(toText(fromNumber(1.5), ',', 0, 0)).toBe('1,5');
    expect(toText(fromNumber(0.0005), '.', 4)).toBe('5');
    expect(toText(fromNumber(1e21), '.')).toBe('1000000000000000000000');
  });
});
