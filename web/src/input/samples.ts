/** Simulated discount factors brought from elsewhere: a heading of dates, then one row of factors a path. */
import type { DateStyle } from './dates';
import { readDate } from './dates';
import { readDecimal, toNumber, type DecimalSign } from './decimal';
import { notUnderstood, understood, type Parsed } from './parsed';
import { cutIntoCells, signOf } from './table';

export interface Samples {
  readonly dates: readonly string[];
  readonly factors: readonly (readonly number[])[];
}

interface Remembered {
  readonly text: string;
  readonly locale: string;
  readonly sign: DecimalSign;
  readonly read: Parsed<Samples>;
}
/** The last reading: samples are long, and most edits are elsewhere. */
let remembered: Remembered | null = null;

export function readSamples(text: string, style: DateStyle, own: DecimalSign): Parsed<Samples> {
  if (remembered?.text === text && remembered.locale === style.locale && remembered.sign === own)
    return remembered.read;
  const read = freshlyRead(text, style, own);
  remembered = { text, locale: style.locale, sign: own, read };
  return read;
}

function freshlyRead(text: string, style: DateStyle, own: DecimalSign): Parsed<Samples> {
  const [heading, ...rows] = cutIntoCells(text);
  if (heading === undefined)
    return notUnderstood('no-samples', 'Paste a heading of dates, then one row of discount factors for each path.');
  const dates: string[] = [];
  for (const cell of heading) {
    const date = readDate(cell, style);
    if (!date.ok) return notUnderstood(date.code, `In the heading: ${date.message}`);
    dates.push(date.value);
  }
  if (rows.length === 0)
    return notUnderstood('no-samples', 'Below the heading of dates, paste one row of discount factors for each path.');
  const sign = signOf(rows.slice(0, 50).flat(), own);
  const factors: number[][] = [];
  for (const [index, row] of rows.entries()) {
    if (row.length !== dates.length)
      return notUnderstood(
        'row-length',
        `Row ${index + 2} has ${row.length} factors where the heading has ${dates.length} dates.`,
      );
    const numbers: number[] = [];
    for (const cell of row) {
      const number = readDecimal(cell, sign);
      if (!number.ok) return notUnderstood(number.code, `In row ${index + 2}: ${number.message}`);
      numbers.push(toNumber(number.value));
    }
    factors.push(numbers);
  }
  return understood({ dates, factors });
}
