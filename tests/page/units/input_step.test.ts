import { describe, expect, test } from 'vitest';
import { stepDate, stepNumber } from '../../../web/src/input/step';

const style = { locale: 'en-GB', after: '2026-12-01' };

describe('what the arrow keys make of a text', () => {
  test.each([
    ['99.95', 'price', 1, '99.96'],
    ['99.99', 'price', 1, '100.00'],
    ['99.95', 'price', -10, '99.85'],
    ['1.1042', 'price', 1, '1.1043'],
    ['100', 'price', 1, '100.01'],
    ['0.01', 'price', -2, '-0.01'],
    ['2.4', 'percent', 1, '2.41'],
    ['2.4%', 'percent', 10, '2.50%'],
    ['240bp', 'percent', 1, '241bp'],
    ['12', 'basis-points', 1, '13'],
    ['10000', 'amount', 1, '11000'],
    ['1.5mn', 'amount', 1, '1.6mn'],
    ['25k', 'amount', -1, '24k'],
    ['2', 'count', -1, '1'],
    ['', 'percent', 1, '0.01'],
    ['abc', 'price', 1, null],
  ] as const)('%s as %s by %s', (text, kind, times, wanted) => {
    expect(stepNumber(text, kind, '.', times)).toBe(wanted);
  });

  test('the decimal sign stays the person’s', () => {
    expect(stepNumber('-0,59', 'price', ',', 1)).toBe('-0,58');
  });

  test.each([
    ['18 Jun 27', 1, false, '19 Jun 27'],
    ['28 Feb 28', 1, false, '29 Feb 28'],
    ['31 Dec 27', 1, false, '1 Jan 28'],
    ['31 Jan 27', 1, true, '28 Feb 27'],
    ['15 Jan 27', -1, true, '15 Dec 26'],
    ['2027-06-18', -1, false, '2027-06-17'],
    ['3M', 1, false, '4M'],
    ['3M', 1, true, '13M'],
    ['1M', -1, false, null],
    ['soon', 1, false, null],
  ] as const)('the date %s by %s, far %s', (text, direction, far, wanted) => {
    expect(stepDate(text, style, direction, far)).toBe(wanted);
  });
});
