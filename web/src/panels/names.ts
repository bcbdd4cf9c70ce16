/** What a place in the request is called, for a person who does not see JSON pointers. */
import { formatDate, formatSigned, isIsoDate, thinSpace } from '../format';
import type { QuoteRequest } from '../model/view';

const parameters: Readonly<Record<string, string>> = {
  r0: 'Short rate today',
  meanReversion: 'Mean reversion',
  longRun: 'Long-run rate',
  volatility: 'Volatility',
  overnight: 'Overnight rate',
  rate: 'Rate',
  weight: 'Weight',
  probability: 'Probability',
  fit: 'Fitted curve',
  curve: 'Rate',
};

/** What stands in the request at a pointer (RFC 6901); undefined where nothing does. */
export function at(request: unknown, pointer: string): unknown {
  return pointer
    .split('/')
    .slice(1)
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .reduce<unknown>(
      (value, part) =>
        typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[part] : undefined,
      request,
    );
}

function text(value: unknown): string {
  return isIsoDate(value) ? formatDate(value) : String(value);
}

function rowName(request: QuoteRequest, pointer: string): string | null {
  const [, list, index] =
    /\/(pillars|items|rows|turns|meetings|scenarios|cash|proportional)\/(\d+)(?:\/|$)/.exec(pointer) ?? [];
  if (!list || !index) return null;
  const row = pointer.slice(0, pointer.indexOf(`/${list}/`) + list.length + index.length + 2);
  if (list === 'pillars') return `Pillar ${text(at(request, `${row}/at`))}`;
  if (list === 'items') {
    const [type = '', tenor, start, end] = ['type', 'tenor', 'start', 'end'].map((name) => {
      const member = at(request, `${row}/${name}`);
      return typeof member === 'string' ? member : undefined;
    });
    const names: Readonly<Record<string, string>> = { deposit: 'Deposit', fra: 'FRA', 'overnight-swap': 'Swap' };
    return `${names[type] ?? type} ${tenor ?? `${start ?? ''}–${end ?? ''}`}`;
  }
  if (list === 'rows')
    return `${pointer.includes('/yield/') ? 'Contract' : 'Forward'} ${text(at(request, `${row}/at`))}`;
  if (list === 'turns') return `Jump ${text(at(request, `${row}/from`))}`;
  if (list === 'meetings') return `Meeting ${text(at(request, `${row}/date`))}`;
  if (list === 'scenarios') return `Scenario ${Number(index) + 1}`;
  return `Income ex ${text(at(request, `${row}/ex`))}`;
}

/** `Pillar 1Y`, `Volatility`, `Meeting 10 Mar 27: −25 bp`, `Income ex 9 Jun 27`. */
export function placeName(request: QuoteRequest, pointer: string): string {
  const member = pointer.slice(pointer.lastIndexOf('/') + 1);
  const row = rowName(request, pointer);
  const move = /^(.*\/moves\/\d+)\//.exec(pointer)?.[1];
  if (row && move) {
    const by = at(request, `${move}/by`);
    const moved = typeof by === 'number' ? `${formatSigned(by * 1e4)}${thinSpace}bp` : '';
    return `${row}: ${moved}${member === 'probability' ? ', probability' : ''}`;
  }
  const known = parameters[member];
  if (row) return pointer.includes('/scenarios/') && known ? `${row}: ${known.toLowerCase()}` : row;
  return known ?? member;
}
