import { beforeEach, describe, expect, it } from 'vitest';
import {
  datesInText,
  decimalsOfTick,
  formatBasisPoints,
  formatDate,
  formatFigures,
  formatLongDate,
  formatMoney,
  formatMonth,
  formatNumber,
  formatPercent,
  formatPrice,
  formatSigned,
  formatSignedMoney,
  minorUnits,
  precisionOf,
} from '../../../web/src/format';
import { preferences } from '../../../web/src/store/signals';

const read = (locale: string, decimal: '.' | ','): void => {
  preferences.value = { locale, decimal };
};

beforeEach(() => read('en-GB', '.'));

describe('numbers', () => {
  it('have exactly the decimals asked for', () => {
    expect(formatNumber(48.5, 2)).toBe('48.50');
    expect(formatNumber(48.005, 0)).toBe('48');
    expect(formatNumber(0.1 + 0.2)).toBe('0.3');
  });

  it('have a true minus, and none where they are shown as zero', () => {
    expect(formatNumber(-0.59, 2)).toBe('\u22120.59');
    expect(formatNumber(-0.004, 2)).toBe('0.00');
    expect(formatNumber(-0, 2)).toBe('0.00');
  });

  it('are grouped and parted as the person writes them', () => {
    read('de-DE', ',');
    expect(formatNumber(480450.5, 2)).toBe('480.450,50');
    read('fr-FR', ',');
    expect(formatNumber(480450.5, 2)).toBe('480\u202f450,50');
    read('de-CH', '.');
    expect(formatNumber(480450.5, 2)).toMatch(/^480['’]450\.50$/);
  });

  it('never have one sign for groups and decimals', () => {
    read('de-DE', '.');
    expect(formatNumber(480450.5, 2)).toBe('480\u202f450.50');
    read('en-GB', ',');
    expect(formatNumber(480450.5, 2)).toBe('480\u202f450,50');
  });

  it('are in Western figures whatever the locale', () => {
    read('ar-EG', '.');
    expect(formatNumber(12.5, 1)).toBe('12.5');
  });

  it('as changes always have their sign', () => {
    expect(formatSigned(0.06, 2)).toBe('+0.06');
    expect(formatSigned(-1.72, 2)).toBe('\u22121.72');
    expect(formatSigned(0.001, 2)).toBe('0.00');
    expect(formatSigned(0, 2)).toBe('0.00');
  });

  it('of the working show nine figures without trailing zeros', () => {
    expect(formatFigures(0.9979254425463377)).toBe('0.99792544');
    expect(formatFigures(2)).toBe('2');
    expect(formatFigures(8121.25)).toBe('8,121.25');
    expect(formatFigures(0)).toBe('0');
  });
});

describe('prices', () => {
  it('have the decimals of their tick', () => {
    expect([0.01, 0.25, 0.00005, 1, 5, 0.5, 1e-7].map(decimalsOfTick)).toEqual([2, 2, 5, 0, 0, 1, 7]);
    expect(formatPrice(47.7, 0.01)).toBe('47.70');
    expect(formatPrice(1.0931, 0.00005)).toBe('1.09310');
  });

  it('without a tick show about six figures and two decimals at least', () => {
    expect(precisionOf(undefined, 1.08).dealt).toBe(5);
    expect(precisionOf(undefined, 48.6).dealt).toBe(4);
    expect(precisionOf(undefined, 8120).dealt).toBe(2);
    expect(precisionOf(undefined, 0.62).dealt).toBe(5);
  });

  it('that are not dealt have two decimals at least', () => {
    expect(precisionOf(1, 8120)).toEqual({ dealt: 0, between: 2 });
    expect(precisionOf(0.00005, 1.08)).toEqual({ dealt: 5, between: 5 });
  });
});

describe('rates and money', () => {
  it('as per cent and basis points', () => {
    expect(formatPercent(-0.0118)).toBe('\u22121.18\u202f%');
    expect(formatBasisPoints(0.0012)).toBe('12\u202fbp');
  });

  // ISO 4217: minor units 2 for the euro and the dollar, 0 for the yen and the Chilean peso, 3 for the Kuwaiti dinar.
  it('has the minor units of ISO 4217', () => {
    expect(['EUR', 'USD', 'JPY', 'CLP', 'KWD'].map(minorUnits)).toEqual([2, 2, 0, 0, 3]);
    expect(minorUnits('not a code')).toBe(2);
    expect(formatMoney(480450, 'EUR')).toBe('EUR\u00a0480,450.00');
    expect(formatMoney(480450.4, 'JPY')).toBe('JPY\u00a0480,450');
    expect(formatSignedMoney(-33.1, 'EUR')).toBe('EUR\u00a0\u221233.10');
  });
});

describe('dates', () => {
  it('as on the desk', () => {
    expect(formatDate('2027-06-18')).toBe('18 Jun 27');
    expect(formatDate('2005-01-03')).toBe('3 Jan 05');
    expect(formatLongDate('2027-06-18')).toBe('Fri 18 Jun 2027');
    expect(formatMonth('2027-01-01')).toBe('Jan 27');
    expect(formatMonth('2027-02-01')).toBe('Feb');
  });

  it('leave what is no date as it is', () => {
    expect(['3M', '', '2027-13-01'].map(formatDate)).toEqual(['3M', '', '2027-13-01']);
    expect(formatDate('2027-02-30')).toBe('2027-02-30');
  });

  it('within a sentence of the core', () => {
    expect(datesInText('2026-12-01 plus 2 business days (EUTA)')).toBe('1 Dec 26 plus 2 business days (EUTA)');
  });

  // Against the calendar of the JavaScript engine, over all months, leap days and the ends of the range.
  it('have the right weekday and month', () => {
    const english = new Intl.DateTimeFormat('en-US', {
      weekday: 'short',
      day: 'numeric',
      month: 'short',
      year: 'numeric',
      timeZone: 'UTC',
    });
    const days = ['1900-01-01', '2000-02-29', '2100-02-28', '2199-12-31'];
    for (let month = 0; month < 48; month += 1)
      days.push(new Date(Date.UTC(2026, month, 28)).toISOString().slice(0, 10));
    for (const day of days) {
      const parts = new Map(english.formatToParts(new Date(day)).map(({ type, value }) => [type, value]));
      const expected = ['weekday', 'day', 'month', 'year'].map((type) => parts.get(type as 'day')).join(' ');
      expect(formatLongDate(day)).toBe(expected);
    }
  });
});
