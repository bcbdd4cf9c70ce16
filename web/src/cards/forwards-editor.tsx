import { Choice, Segmented } from '../fields/choice';
import { interpolations } from '../fields/conventions';
import { Field } from '../fields/field';
import { Rows, type RowColumn } from '../fields/rows';
import { typed } from '../store/session';

interface ForwardsEditorProps {
  readonly path: string;
  readonly at: string;
  /** Of a pair, whose forwards may be quoted in points; another asset's are listed contracts. */
  readonly ofPair: boolean;
}

function columns(points: boolean): readonly RowColumn[] {
  const holds = points ? 'plain' : 'price';
  return [
    {
      name: 'at',
      label: 'Maturity',
      holds: 'date-or-tenor',
      called: ['at', 'date', 'tenor', 'term', 'maturity', 'contract', 'expiry'],
      size: 9,
    },
    { name: 'bid', label: 'Bid', holds, called: ['bid', 'buy'], size: 7 },
    { name: 'offer', label: 'Offer', holds, called: ['offer', 'ask', 'sell'], size: 7 },
  ];
}

/** Forwards that the market quotes: what the asset earns is implied by them, on both sides. */
export function ForwardsEditor({ path, at, ofPair }: ForwardsEditorProps) {
  const points = ofPair && typed(`${path}/quoted`) === 'points';
  return (
    <>
      {ofPair && (
        <Segmented
          label="Forwards are quoted"
          path={`${path}/quoted`}
          options={[
            { value: 'points', name: 'In points' },
            { value: 'outright', name: 'Outright' },
          ]}
        />
      )}
      <Rows
        name="Forwards quoted"
        rowName="Forward quoted"
        path={`${path}/rows`}
        at={`${at}/rows`}
        columns={columns(points)}
      />
      <p class="field-hint">
        One figure, under Bid, stands for both sides. Rows copied from a spreadsheet paste into any cell.
      </p>
      {points && (
        <Field
          label="Points in one"
          path={`${path}/scale`}
          at={`${at}/scale`}
          kind="plain"
          placeholder="10000"
          hint="Outright is spot plus points divided by this; 100 against the yen."
        />
      )}
      <Choice
        label="Between the rows"
        path={`${path}/interpolation`}
        at={`${at}/interpolation`}
        options={interpolations}
      />
    </>
  );
}
