/** Pasted cells sorted into the columns of a table of the page: by the heading where there is one, else by what they are. */
import { readDate, readTenor, type DateStyle } from './dates';
import { readNumber, type NumberKind } from './quantities';
import { dateToText } from './step';
import type { DecimalSign } from './decimal';
import { cutIntoCells, signOf, swapSigns } from './table';

export interface Column {
  readonly name: string;
  readonly holds: 'date' | 'date-or-tenor' | 'text' | NumberKind;
  /** What a text of this column looks like, to tell it from others. */
  readonly like?: RegExp;
  /** What a heading may call it, lower case. */
  readonly called: readonly string[];
}

export type PastedRow = Readonly<Record<string, string>>;

function isDate(cell: string, style: DateStyle): boolean {
  return readDate(cell, style).ok;
}

function isNumber(cell: string, kind: NumberKind, sign: DecimalSign): boolean {
  return readNumber(cell, kind, sign).ok;
}

function fits(cell: string, column: Column, style: DateStyle, sign: DecimalSign): boolean {
  if (column.holds === 'date') return isDate(cell, style);
  if (column.holds === 'date-or-tenor') return isDate(cell, style) || readTenor(cell) !== null;
  if (column.holds === 'text') return column.like?.test(cell) ?? true;
  return isNumber(cell, column.holds, sign);
}

function columnCalled(heading: string, columns: readonly Column[]): Column | null {
  const words = heading
    .toLowerCase()
    .replace(/[^\p{L}]+/gu, ' ')
    .trim();
  const whole = columns.find((column) => column.called.includes(words));
  if (whole !== undefined) return whole;
  return columns.find((column) => column.called.some((call) => words.split(' ').includes(call))) ?? null;
}

/** The column of each cell, from the heading; null where the first row is no heading. */
function fromHeading(
  first: readonly string[],
  columns: readonly Column[],
  style: DateStyle,
  sign: DecimalSign,
): readonly (Column | null)[] | null {
  const holdsValues = first.some((cell) => columns.some((column) => fits(cell, column, style, sign)));
  if (holdsValues || !first.some((cell) => /\p{L}/u.test(cell))) return null;
  const named = first.map((cell) => columnCalled(cell, columns));
  return named.some((column) => column !== null) ? named : null;
}

/** The columns in their order, a column whose kind a cell cannot be being passed over when a later one fits. */
function fromValues(
  row: readonly string[],
  columns: readonly Column[],
  style: DateStyle,
  sign: DecimalSign,
): readonly (Column | null)[] {
  let next = 0;
  return row.map((cell) => {
    if (cell === '') {
      next += 1;
      return columns[next - 1] ?? null;
    }
    const fitting = columns.findIndex((column, index) => index >= next && fits(cell, column, style, sign));
    const taken = fitting < 0 ? next : fitting;
    next = taken + 1;
    return columns[taken] ?? null;
  });
}

/** Whether the slashed dates of a table put the month first, where one of them can be read only so. */
function monthFirst(cells: readonly string[]): boolean | null {
  for (const cell of cells) {
    const match = /^(\d{1,2})[/-](\d{1,2})[/-]\d{2,4}$/.exec(cell);
    if (match !== null && Number(match[2]) > 12) return true;
    if (match !== null && Number(match[1]) > 12) return false;
  }
  return null;
}

/**
 * The rows of a pasted text. Cells that are understood are written the person's own way; the others stay as they
 * were, to be marked in place.
 */
export function readRows(
  text: string,
  columns: readonly Column[],
  style: DateStyle,
  own: DecimalSign,
): readonly PastedRow[] {
  const cells = cutIntoCells(text);
  const all = cells.flat();
  const first = monthFirst(all);
  const dates: DateStyle = first === null ? style : { ...style, locale: first ? 'en-US' : 'en-GB' };
  const sign = signOf(
    all.filter((cell) => !isDate(cell, dates)),
    own,
  );
  const heading = fromHeading(cells[0] ?? [], columns, dates, sign);
  const rows = heading === null ? cells : cells.slice(1);
  const widest = rows.reduce<readonly string[]>((most, row) => (row.length > most.length ? row : most), []);
  const placed = heading ?? fromValues(widest, columns, dates, sign);

  return rows.map((row) => {
    const made: Record<string, string> = Object.fromEntries(columns.map((column) => [column.name, '']));
    row.forEach((cell, index) => {
      const column = placed[index];
      if (column !== null && column !== undefined) made[column.name] = written(cell, column);
    });
    return made;
  });

  function written(cell: string, column: Column): string {
    if (column.holds === 'date' || column.holds === 'date-or-tenor') {
      const date = readDate(cell, dates);
      return date.ok ? dateToText(date.value) : cell;
    }
    if (column.holds === 'text') return cell;
    return sign !== own && isNumber(cell, column.holds, sign) ? swapSigns(cell) : cell;
  }
}
