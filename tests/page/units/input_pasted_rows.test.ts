import { describe, expect, test } from 'vitest';
import { readRows, type Column } from '../../../web/src/input/pasted-rows';
import { readSamples } from '../../../web/src/input/samples';

const style = { locale: 'en-GB', after: '2026-12-01' };
const columns: readonly Column[] = [
  { name: 'ex', holds: 'date', called: ['ex', 'ex date', 'date'] },
  { name: 'pay', holds: 'date', called: ['pay', 'paid', 'pay date'] },
  { name: 'amount', holds: 'price', called: ['amount', 'dividend'] },
  { name: 'low', holds: 'price', called: ['low'] },
  { name: 'high', holds: 'price', called: ['high'] },
];
const row = (ex: string, pay: string, amount: string, low = '', high = '') => ({
  ex,
  pay,
  amount,
  low,
  high,
});
const read = (text: string, sign: '.' | ',' = '.') => readRows(text, columns, style, sign);

describe('rows pasted from a spreadsheet', () => {
  const wanted = [row('10 Mar 27', '24 Mar 27', '1.20'), row('9 Jun 27', '23 Jun 27', '0.60')];

  test('without a heading, by tabs', () => {
    expect(read('2027-03-10\t2027-03-24\t1.20\n2027-06-09\t2027-06-23\t0.60\n')).toEqual(wanted);
  });

  test('with a heading in another order, and columns that are not wanted', () => {
    const text =
      'Dividend\tCompany\tPay date\tEx-date\r\n1.20\tx\t24 Mar 27\t10 Mar 27\r\n0.60\tx\t23/06/27\t9.6.2027\r\n';
    expect(read(text)).toEqual(wanted);
  });

  test('with decimal commas and semicolons, written the person’s own way', () => {
    expect(read('10.03.2027;24.03.2027;1,20\n09.06.2027;23.06.2027;0,60')).toEqual(wanted);
    expect(read('10.03.2027;24.03.2027;1.20\n09.06.2027;23.06.2027;0.60', ',')).toEqual([
      row('10 Mar 27', '24 Mar 27', '1,20'),
      row('9 Jun 27', '23 Jun 27', '0,60'),
    ]);
  });

  test('as comma-separated values with quotes', () => {
    expect(read('ex,pay,amount\n"10 Mar 27","24 Mar 27",1.20\n9 Jun 27,23 Jun 27,"0.60"')).toEqual(wanted);
  });

  test('without a pay date the amount still finds its column', () => {
    expect(read('10 Mar 27\t1.20\n9 Jun 27\t0.60')).toEqual([
      row('10 Mar 27', '', '1.20'),
      row('9 Jun 27', '', '0.60'),
    ]);
  });

  test('one date that can only put the month first decides for all of them', () => {
    expect(read('03/10/2027\t1.20\n06/29/2027\t0.60').map(({ ex }) => ex)).toEqual(['10 Mar 27', '29 Jun 27']);
  });

  test('what is not understood stays as it was, in its place', () => {
    expect(read('10 Mar 27\t24 Mar 27\t1.20\nmid June\t23 Jun 27\tabout 0.6')).toEqual([
      row('10 Mar 27', '24 Mar 27', '1.20'),
      row('mid June', '23 Jun 27', 'about 0.6'),
    ]);
  });

  test('an empty cell leaves its column empty', () => {
    expect(read('10 Mar 27\t\t1.20\t1.10\t1.30')).toEqual([row('10 Mar 27', '', '1.20', '1.10', '1.30')]);
  });
});

describe('pasted samples', () => {
  test('a heading of dates, a row a path', () => {
    const read = readSamples('1 Mar 27\t2027-06-01\n0.994\t0.988\n0.995\t0.990\n', style, '.');
    expect(read).toEqual({
      ok: true,
      value: {
        dates: ['2027-03-01', '2027-06-01'],
        factors: [
          [0.994, 0.988],
          [0.995, 0.99],
        ],
      },
    });
  });

  test('decimal commas are seen by themselves', () => {
    const read = readSamples('1 Mar 27;1 Jun 27\n0,994;0,988', style, '.');
    expect(read.ok && read.value.factors).toEqual([[0.994, 0.988]]);
  });

  test.each([
    ['1 Mar 27\t1 Jun 27\n0.994', 'Row 2 has 1 factors where the heading has 2 dates.'],
    ['1 Mar 27\t1 Jun 27\n0.994\tx', 'In row 2: “x” is not a number: write it as 1234.5.'],
    ['first\t1 Jun 27\n0.994\t0.99', 'In the heading: “first” is not a date: write it as 18 Jun 27 or 2027-06-18.'],
  ])('%j says what is wrong where', (text, message) => {
    const read = readSamples(text, style, '.');
    expect(read.ok ? '' : read.message).toBe(message);
  });
});
