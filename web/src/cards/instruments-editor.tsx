import { Choice } from '../fields/choice';
import { dayCounts, interpolations } from '../fields/conventions';
import { Field } from '../fields/field';
import { Rows, type RowColumn } from '../fields/rows';
import { typed } from '../store/session';

const columns: readonly RowColumn[] = [
  {
    name: 'type',
    label: 'What',
    holds: 'text',
    like: /^(deposit|depo|cash|fra|swap|ois|overnight)/i,
    called: ['type', 'what', 'instrument', 'kind', 'product'],
    size: 7,
  },
  {
    name: 'tenor',
    label: 'Tenor',
    holds: 'text',
    like: /^(ON|TN|SN|\d+\s*[DWMY]?(\s*[x×/–-]\s*\d+\s*[DWMY]?)?)$/i,
    called: ['tenor', 'term', 'maturity', 'period'],
    size: 7,
  },
  { name: 'rate', label: 'Rate', unit: '%', holds: 'percent', called: ['rate', 'quote', 'value', 'yield'], size: 7 },
  {
    name: 'dayCount',
    label: 'Day count',
    holds: 'text',
    like: /^(ACT\/|30E?\/|BUS\/)/i,
    called: ['day count', 'daycount', 'basis', 'convention'],
    size: 8,
    rare: true,
  },
  {
    name: 'payments',
    label: 'Pays',
    holds: 'text',
    like: /^(annual|semiannual|quarterly|monthly|at-end)$/i,
    called: ['payments', 'pays', 'frequency'],
    size: 8,
    rare: true,
  },
];

const turnColumns: readonly RowColumn[] = [
  { name: 'from', label: 'From', holds: 'date', called: ['from', 'start'], size: 10 },
  { name: 'to', label: 'To', holds: 'date', called: ['to', 'end', 'until'], size: 10 },
  { name: 'spread', label: 'Higher by', unit: 'bp', holds: 'basis-points', called: ['spread', 'bp', 'jump'], size: 6 },
];

const payments = [
  { value: 'annual', name: 'once a year' },
  { value: 'semiannual', name: 'twice a year' },
  { value: 'quarterly', name: 'every quarter' },
  { value: 'monthly', name: 'every month' },
  { value: 'at-end', name: 'once, at the end' },
];

/** What the money market quotes; the curve gives each its quote again. */
export function InstrumentsEditor({ path, at }: { readonly path: string; readonly at: string }) {
  const ownCalendars = [`${path}/calendars`, `${path}/holidays`, `${path}/openDays`].some(
    (own) => typed(own).trim() !== '',
  );
  return (
    <>
      <Rows name="Instruments" rowName="Instrument" path={`${path}/rows`} at={`${at}/items`} columns={columns} />
      <p class="field-hint">
        Deposit, FRA or swap; tenors as ON, 3M, 2Y, of a FRA as 3x6. Rows copied from a spreadsheet paste into any cell.
      </p>
      <div class="field-row">
        <Choice label="Deposits, FRAs" path={`${path}/dayCount`} at={`${at}/dayCount`} options={dayCounts} />
        <Choice label="Swaps" path={`${path}/swapDayCount`} at={`${at}/swapDayCount`} options={dayCounts} />
      </div>
      <Choice label="Swaps pay" path={`${path}/payments`} at={`${at}/payments`} options={payments} />
      <Choice
        label="Between the instruments"
        path={`${path}/interpolation`}
        at={`${at}/interpolation`}
        options={interpolations}
      />
      <div class="field-row">
        <Field
          label="Begin after"
          path={`${path}/spotLag`}
          at={`${at}/spotLag`}
          kind="count"
          unit="days"
          placeholder="2"
        />
        <Field label="Calendars" path={`${path}/calendars`} at={`${at}/calendars`} kind="text" whole />
      </div>
      {ownCalendars && (
        <>
          <Field label="Its holidays" path={`${path}/holidays`} at={`${at}/holidays`} kind="text" whole />
          <Field label="Its open days" path={`${path}/openDays`} at={`${at}/openDays`} kind="text" whole />
        </>
      )}
      <h4>Jumps of the overnight rate</h4>
      <Rows
        name="Jumps of the overnight rate"
        rowName="Jump"
        path={`${path}/turns`}
        at={`${at}/turns`}
        columns={turnColumns}
      />
      <p class="field-hint">As over a year’s end: from its first day to the day after its last.</p>
    </>
  );
}
