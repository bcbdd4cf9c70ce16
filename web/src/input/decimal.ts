/**
 * Decimal numbers as people type them, kept exact: what is shown as per cent and sent as a fraction has its decimal
 * point moved in the text, never multiplied, so that 3.1 % is 0.031 and not a neighbour of it.
 */
import { notUnderstood, understood, type Parsed } from './parsed';

export type DecimalSign = '.' | ',';

/** ±digits × 10^exponent; digits is a whole number without leading zeros. */
export interface Decimal {
  readonly negative: boolean;
  readonly digits: string;
  readonly exponent: number;
}

const spaces = "\\u0020\\u00a0\\u2009\\u202f'’";
const mostDigits = 60;

function pattern(decimal: DecimalSign): RegExp {
  const other = decimal === '.' ? ',' : '\\.';
  const sign = decimal === '.' ? '\\.' : ',';
  const whole = `(?<grouped>[1-9]\\d{0,2}(?:(?<group>[${spaces}${other}])\\d{3})(?:\\k<group>\\d{3})*)|(?<plain>\\d*)`;
  return new RegExp(`^(?<minus>[-−–+]?)\\s*(?:${whole})(?:${sign}(?<fraction>\\d*))?(?:[eE](?<power>[+-]?\\d{1,3}))?$`);
}

const patterns: Record<DecimalSign, RegExp> = { '.': pattern('.'), ',': pattern(',') };

function otherSign(sign: DecimalSign): DecimalSign {
  return sign === '.' ? ',' : '.';
}

function take(match: RegExpExecArray): Decimal | null {
  const { grouped, plain, fraction, minus, power } = match.groups as Record<string, string | undefined>;
  const whole = (grouped ?? plain ?? '').replace(/\D/g, '');
  const digits = (whole + (fraction ?? '')).replace(/^0+(?=\d)/, '');
  if (digits === '' || digits.length > mostDigits) return null;
  return {
    negative: minus !== '' && minus !== '+',
    digits,
    exponent: Number(power ?? 0) - (fraction ?? '').length,
  };
}

/**
 * Reads a number by the person's decimal sign; the other sign is understood where it can only be one thing.
 * With `ask`, a text such as `1,234` that reads as thousands but may be a decimal written the other way is a question.
 */
export function readDecimal(text: string, sign: DecimalSign, ask = false): Parsed<Decimal> {
  const typed = text.trim();
  const other = otherSign(sign);
  const own = patterns[sign].exec(typed);
  if (own !== null) {
    const value = take(own);
    if (value !== null) {
      const groups = own.groups as Record<string, string | undefined>;
      const once = typed.split(other).length === 2;
      if (ask && groups['group'] === other && once && groups['fraction'] === undefined) {
        const thousands = typed.replace(other, '');
        const fraction = typed.replace(other, sign);
        return notUnderstood(
          'ambiguous-number',
          `“${typed}” could be ${thousands} or ${fraction}: write the one you mean.`,
        );
      }
      return understood(value);
    }
  }
  const foreign = patterns[other].exec(typed);
  const value = foreign === null ? null : take(foreign);
  if (value !== null) return understood(value);
  const example = sign === '.' ? '1234.5' : '1234,5';
  return notUnderstood('not-a-number', `“${typed}” is not a number: write it as ${example}.`);
}

/** The number times 10^places, correctly rounded to the nearest double. */
export function toNumber(value: Decimal, places = 0): number {
  return Number(`${value.negative ? '-' : ''}${value.digits}e${value.exponent + places}`);
}

/** The shortest decimal that reads back as the same double. */
export function fromNumber(value: number): Decimal {
  const [mantissa = '0', power = '0'] = Math.abs(value).toString().split('e');
  const [whole = '0', fraction = ''] = mantissa.split('.');
  return {
    negative: value < 0,
    digits: (whole + fraction).replace(/^0+(?=\d)/, ''),
    exponent: Number(power) - fraction.length,
  };
}

/** The number times 10^places as plain text, with at least `decimals` decimals. */
export function toText(value: Decimal, sign: DecimalSign, places = 0, decimals = 0): string {
  let { digits } = value;
  let exponent = value.exponent + places;
  if (exponent > 0) {
    digits += '0'.repeat(exponent);
    exponent = 0;
  }
  const padded = digits.padStart(1 - exponent, '0');
  const whole = padded.slice(0, padded.length + exponent).replace(/^0+(?=\d)/, '');
  let fraction = padded.slice(padded.length + exponent);
  while (fraction.length > decimals && fraction.endsWith('0')) fraction = fraction.slice(0, -1);
  fraction = fraction.padEnd(decimals, '0');
  return `${value.negative ? '-' : ''}${whole}${fraction === '' ? '' : sign + fraction}`;
}

/** The text of a whole or decimal number with its thousands set apart. */
export function grouped(text: string, sign: DecimalSign): string {
  const [whole = '', ...fraction] = text.split(sign);
  const groups = whole.replace(/\B(?=(?:\d{3})+$)/g, otherSign(sign));
  return [groups, ...fraction].join(sign);
}

/** A number of a request as the text of a field that shows it times 10^places. */
export function numberToText(value: number, sign: DecimalSign, places = 0): string {
  return toText(fromNumber(value), sign, places);
}

/** The exact sum. */
export function add(one: Decimal, two: Decimal): Decimal {
  const exponent = Math.min(one.exponent, two.exponent);
  const whole = (value: Decimal): bigint =>
    BigInt(value.digits) * 10n ** BigInt(value.exponent - exponent) * (value.negative ? -1n : 1n);
  const sum = whole(one) + whole(two);
  return { negative: sum < 0n, digits: (sum < 0n ? -sum : sum).toString(), exponent };
}
