/** Rows pasted from a spreadsheet: how they are cut into cells, and how their numbers and dates are written. */
import Papa from 'papaparse';
import { readDecimal, type DecimalSign } from './decimal';

/** The text's cells; blank lines are left out. */
export function cutIntoCells(text: string): readonly (readonly string[])[] {
  const lines = text.replace(/\r\n?/g, '\n').replace(/\n+$/, '');
  const delimiter = ['\t', ';', '|'].find((sign) => lines.includes(sign)) ?? (/ {2,}\S/.test(lines) ? null : ',');
  const cells =
    delimiter === null
      ? lines.split('\n').map((line) => line.trim().split(/ {2,}/))
      : Papa.parse<string[]>(lines, { delimiter, skipEmptyLines: 'greedy' }).data;
  return cells.map((row) => row.map((cell) => cell.trim())).filter((row) => row.some((cell) => cell !== ''));
}

/** The decimal sign that the numbers of a pasted table can only have been written with; else the person's own. */
export function signOf(cells: readonly string[], own: DecimalSign): DecimalSign {
  const certain = (cell: string, sign: DecimalSign): boolean => {
    const other = sign === '.' ? ',' : '.';
    const number = cell.replace(/[%a-z]+$/i, '').trim();
    return readDecimal(number, sign).ok && number.includes(sign) && !isGrouping(number, sign, other);
  };
  const points = cells.filter((cell) => certain(cell, '.')).length;
  const commas = cells.filter((cell) => certain(cell, ',')).length;
  if (points > 0 && commas === 0) return '.';
  if (commas > 0 && points === 0) return ',';
  return own;
}

/** Whether `sign` may stand between thousands rather than before decimals. */
function isGrouping(number: string, sign: DecimalSign, other: DecimalSign): boolean {
  const groups = number.replace(/^[-−–+]/, '').split(sign);
  return (
    groups.length > 2 ||
    number.indexOf(sign) < number.indexOf(other) ||
    (/^[1-9]\d{0,2}$/.test(groups[0] ?? '') && /^\d{3}$/.test(groups[1] ?? ''))
  );
}

/** Changes between decimal point and decimal comma, grouping along with it. */
export function swapSigns(text: string): string {
  return text.replace(/[.,]/g, (sign) => (sign === '.' ? ',' : '.'));
}
