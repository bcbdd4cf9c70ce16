import { readMaturity } from '../input/dates';

export interface Word {
  readonly typed: string;
  readonly maturity: string;
}

/** Maturities apart by commas, semicolons or line ends; tenors by spaces too. */
export function maturitiesOf(text: string, locale: string, after: string): readonly Word[] {
  return text
    .split(/[,;\n]+/)
    .flatMap((part) => {
      const words = part.trim().split(/\s+/);
      return words.every((word) => /^\d+[a-z]$/i.test(word)) ? words : [part.trim()];
    })
    .filter((word) => word !== '')
    .map((typed) => {
      const read = readMaturity(typed, { locale, after });
      return { typed, maturity: read.ok ? read.value : typed };
    });
}
