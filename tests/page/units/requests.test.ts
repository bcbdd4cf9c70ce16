import { describe, expect, test } from 'vitest';
import { shortened, textWidth } from '../../../web/src/charts/text-width';
import { maturitiesOf } from '../../../web/src/requests/maturities';

describe('maturities as typed', () => {
  const of = (text: string): readonly string[] =>
    maturitiesOf(text, 'en-GB', '2026-12-01').map(({ maturity }) => maturity);

  test('tenors apart by spaces, dates by commas, semicolons and line ends', () => {
    expect(of('1M 3m\n18 Jun 27; 2Y, 2028-01-03')).toEqual(['1M', '3M', '2027-06-18', '2Y', '2028-01-03']);
  });

  test('what is no maturity stays as it was typed, so that the core names it', () => {
    expect(of('1M, sometime')).toEqual(['1M', 'sometime']);
    expect(of(' , ;')).toEqual([]);
  });
});

describe('a name shortened to its room', () => {
  test('is whole where it fits, else ends in a mark and fits', () => {
    expect(shortened('Hull–White', 1000, 13)).toBe('Hull–White');
    const short = shortened('Vasicek: from 2.1 % to 2.6 %, volatility 0.8 %', 120, 13);
    expect(short.endsWith('…')).toBe(true);
    expect(textWidth(short, 13)).toBeLessThanOrEqual(120);
  });
});
