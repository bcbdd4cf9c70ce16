import { Segmented } from '../fields/choice';
import { RateConvention } from '../fields/conventions';
import { Field } from '../fields/field';
import { Rows, type RowColumn } from '../fields/rows';
import { isBlank } from '../model/draft';
import { market } from '../store/session';
import { forwardsWords } from './base-card';
import { Distributions } from './distributions';
import { Card, type CardView } from './card';
import { ForwardsEditor } from './forwards-editor';
import { said, twoSides } from './words';

const ex: RowColumn = {
  name: 'ex',
  label: 'Ex',
  holds: 'date',
  called: ['ex', 'ex date', 'exdate', 'date', 'when'],
  size: 8,
};
const low = { name: 'low', label: 'Low', called: ['low', 'lowest', 'min'], size: 3 } as const;
const high = { name: 'high', label: 'High', called: ['high', 'highest', 'max'], size: 3 } as const;

const cashColumns: readonly RowColumn[] = [
  ex,
  { name: 'pay', label: 'Paid', holds: 'date', called: ['pay', 'paid', 'payment', 'pay date'], size: 8 },
  {
    name: 'amount',
    label: 'Amount',
    holds: 'price',
    called: ['amount', 'dividend', 'cash', 'expected', 'estimate'],
    size: 4,
  },
  { ...low, holds: 'price' },
  { ...high, holds: 'price' },
];
const proportionalColumns: readonly RowColumn[] = [
  ex,
  {
    name: 'fraction',
    label: 'Share',
    unit: '%',
    holds: 'percent',
    called: ['fraction', 'share', 'percent', 'proportion', 'yield', 'amount'],
    size: 6,
  },
  { ...low, holds: 'percent' },
  { ...high, holds: 'percent' },
];

/** What a distribution has beside the columns: nothing out of the usual. */
const emptyDetails = {
  status: '',
  type: '',
  treatment: '',
  currency: '',
  forwardRate: '',
  passBid: '',
  passOffer: '',
};

function counted(count: number, one: string, many: string): string {
  return `${count} ${count === 1 ? one : many}`;
}

export function IncomeCard({ alwaysOpen }: CardView) {
  const { income, asset } = market.value;
  const cash = income.cash.filter((row) => !isBlank(row));
  const proportional = income.proportional.filter((row) => !isBlank(row));
  const implied = income.yieldIs === 'contracts';
  const amounts = cash.map((row) => `${row.amount.trim()} on ${row.ex.trim()}`);
  const value =
    cash.length + proportional.length > 0
      ? counted(cash.length + proportional.length, 'row', 'rows')
      : implied
        ? 'listed contracts'
        : income.yield.rate.trim() === ''
          ? 'none'
          : `yield ${said(income.yield.rate, '%')}`;
  const summary = [
    cash.length > 0 && `${amounts.slice(0, 2).join(', ')}${cash.length > 2 ? ` and ${cash.length - 2} more` : ''}`,
    proportional.length > 0 && `${counted(proportional.length, 'share', 'shares')} of price`,
    implied
      ? `yield from contracts, ${forwardsWords(income.contracts)}`
      : income.yield.rate.trim() !== '' && `yield ${said(income.yield.rate, '%')}`,
  ].filter(Boolean);
  const { passThrough } = income;
  return (
    <Card
      id="income"
      name="Income"
      value={value}
      summary={summary.length === 0 ? 'nothing is distributed' : summary.join('; ')}
      alwaysOpen={alwaysOpen}
    >
      <h4>In money, {asset.currency.toUpperCase()} a unit</h4>
      <Rows
        name="Income in money"
        rowName="Distribution"
        path="market/income/cash"
        at="/market/income/cash"
        columns={cashColumns}
        rest={emptyDetails}
      />
      <p class="field-hint">Rows copied from a spreadsheet paste into any cell. A cost is a negative amount.</p>
      <Distributions />
      <h4>As a share of the price</h4>
      <Rows
        name="Income as a share of the price"
        rowName="Share of the price"
        path="market/income/proportional"
        at="/market/income/proportional"
        columns={proportionalColumns}
      />
      <h4>As a yield</h4>
      <Segmented
        label="The yield is"
        path="market/income/yieldIs"
        options={[
          { value: 'rate', name: 'Steady' },
          { value: 'contracts', name: 'From listed contracts' },
        ]}
      />
      {implied ? (
        <ForwardsEditor path="market/income/contracts" at="/market/income/yield" ofPair={false} />
      ) : (
        <>
          <Field label="Yield" path="market/income/yield/rate" kind="percent" unit="% a year" />
          {income.yield.rate.trim() !== '' && <RateConvention path="market/income/yield" />}
        </>
      )}
      <h4>Passed through to the hedge</h4>
      <div class="field-row">
        <Field label="Bid: owed when short" path="market/income/passThrough/bid" kind="percent" unit="%" />
        <Field label="Offer: kept when long" path="market/income/passThrough/offer" kind="percent" unit="%" />
      </div>
      <p class="field-hint">
        {twoSides(passThrough.bid, passThrough.offer) === 'none' ? 'All of it, on both sides.' : 'Fair takes the mean.'}
      </p>
    </Card>
  );
}
