import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readDate, readMaturity, readTenor } from '../../../web/src/input/dates';
import { dateToText, stepDate } from '../../../web/src/input/step';

const british = { locale: 'en-GB', after: '2026-12-01' };
const american = { locale: 'en-US', after: '2026-12-01' };
const german = { locale: 'de-DE', after: '2026-12-01' };
const french = { locale: 'fr-FR', after: '2026-12-01' };

function read(text: string, style = british): string {
  const parsed = readDate(text, style);
  return parsed.ok ? parsed.value : parsed.code;
}

describe('dates as people write them', () => {
  test.each([
    '18 Jun 27',
    '18 jun 2027',
    '18Jun27',
    '18-Jun-27',
    '18 June 2027',
    '18th June 2027',
    'June 18, 2027',
    'Jun 18 2027',
    'Fri 18 Jun 27',
    'Friday, 18 June 2027',
    '18.6.27',
    '18.06.2027',
    '18/06/2027',
    '2027-06-18',
    '2027/06/18',
    '20270618',
    '2027-06-18T00:00:00',
    '18 Jun',
  ])('%s', (text) => {
    expect(read(text)).toBe('2027-06-18');
  });

  test('the month comes first only where the person’s language puts it there, or where it must', () => {
    expect(read('3/4/27', british)).toBe('2027-04-03');
    expect(read('3/4/27', american)).toBe('2027-03-04');
    expect(read('3.4.27', american)).toBe('2027-04-03');
    expect(read('6/18/27', british)).toBe('2027-06-18');
  });

  test('months by their names in the person’s language, and in English', () => {
    expect(read('18. Juni 2027', german)).toBe('2027-06-18');
    expect(read('18. Dez. 27', german)).toBe('2027-12-18');
    expect(read('18 Dec 27', german)).toBe('2027-12-18');
    expect(read('18 juin 2027', french)).toBe('2027-06-18');
  });

  test('a day without a year is the next one', () => {
    expect(read('1 Dec')).toBe('2027-12-01');
    expect(read('2 Dec')).toBe('2026-12-02');
    expect(read('29 Feb')).toBe('2028-02-29');
  });

  test.each(['', 'soon', '31 Feb 27', '29 Feb 27', '32 Jan 27', '0 Jan 27', '13/13/27', '18 Ju 27', '2027-13-01'])(
    '%s is refused',
    (text) => {
      expect(read(text)).toBe('not-a-date');
    },
  );

  test.each([
    ['3M', '3M'],
    ['3m', '3M'],
    ['3 m', '3M'],
    ['18 months', '18M'],
    ['2w', '2W'],
    ['10d', '10D'],
    ['1 year', '1Y'],
    ['1.5y', null],
    ['M', null],
    ['3q', null],
  ])('%s as a tenor', (text, tenor) => {
    expect(readTenor(text)).toBe(tenor);
  });

  test('a maturity is either', () => {
    expect(readMaturity('3m', british)).toEqual({ ok: true, value: '3M' });
    const read = (text: string) => readMaturity(text, british);
    for (const text of ['ON', 'o/n', 'O/N']) expect(read(text)).toEqual({ ok: true, value: 'ON' });
    expect(read('tn')).toEqual({ ok: true, value: 'TN' });
    for (const text of ['3rd Wed Mar 27', 'third Wednesday of March 2027', 'third-wednesday 2027-03'])
      expect(read(text), text).toEqual({ ok: true, value: 'third-wednesday 2027-03' });
    expect(read('3rd Fri Jun 27')).toEqual({ ok: true, value: 'third-friday 2027-06' });
    expect(read('3rd Wed Nothing 27').ok).toBe(false);
    expect(readMaturity('18 Jun 27', british)).toEqual({ ok: true, value: '2027-06-18' });
    const parsed = readMaturity('3x', british);
    expect(parsed.ok ? '' : parsed.message).toContain('neither a date nor a tenor');
  });

  const day = fc.date({
    min: new Date('1900-01-01T00:00:00Z'),
    max: new Date('2199-12-31T00:00:00Z'),
    noInvalidDate: true,
  });

  test('every day of the contract reads back from the text the page writes for it', () => {
    fc.assert(
      fc.property(day, (date) => {
        const iso = date.toISOString().slice(0, 10);
        const parsed = readDate(dateToText(iso), british);
        return parsed.ok && parsed.value === iso;
      }),
      { seed: 20261201 },
    );
  });

  test('a step up and a step down come back to the day', () => {
    fc.assert(
      fc.property(day, (date) => {
        const text = dateToText(date.toISOString().slice(0, 10));
        const up = stepDate(text, british, 1, false);
        return up !== null && stepDate(up, british, -1, false) === text;
      }),
      { seed: 20261201 },
    );
  });

  test('no text makes it throw', () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        readMaturity(text, british);
      }),
      { seed: 20261201 },
    );
  });
});
