import { Choice } from '../fields/choice';
import { Field } from '../fields/field';
import { Rows, type RowColumn } from '../fields/rows';
import type { AssetKind } from '../model/request';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { PresetField } from './preset-field';
import { said } from './words';

const kindNames: Readonly<Record<AssetKind, string>> = {
  share: 'share',
  index: 'index',
  'currency-pair': 'currency pair',
  commodity: 'commodity',
};
const rolls = [
  { value: '', name: 'is refused' },
  { value: 'following', name: 'moves to the next business day' },
  { value: 'modified-following', name: 'moves to the next, within the month' },
  { value: 'preceding', name: 'moves to the one before' },
];
const lagColumns: readonly RowColumn[] = [
  { name: 'from', label: 'Dealt from', holds: 'date', called: ['from', 'date', 'dealt'], size: 10 },
  { name: 'lag', label: 'Days', holds: 'count', called: ['lag', 'days'], size: 4 },
];

export function ConventionsCard({ alwaysOpen }: CardView) {
  const { asset } = market.value;
  const pair = asset.kind === 'currency-pair';
  const calendars = asset.calendars.trim() === '' ? 'weekends only' : asset.calendars.trim().toUpperCase();
  const tick = asset.tick.trim() === '' ? 'no tick' : `tick ${asset.tick.trim()}`;
  return (
    <Card
      id="conventions"
      name="Conventions"
      value={`${said(asset.currency.toUpperCase())} ${kindNames[asset.kind]}`}
      summary={`settles in ${said(asset.lag)} days, ${calendars}, ${tick}`}
      alwaysOpen={alwaysOpen}
    >
      <PresetField />
      <Field label="Name" path="market/asset/name" kind="text" />
      <div class="field-row">
        <Choice
          label="Kind"
          path="market/asset/kind"
          options={Object.entries(kindNames).map(([value, name]) => ({ value, name }))}
        />
        <Field label="Currency" path="market/asset/currency" kind="text" placeholder="EUR" />
        {pair && <Field label="Base currency" path="market/asset/base" kind="text" placeholder="USD" />}
      </div>
      <div class="field-row">
        <Field
          label="Settles after"
          path="market/asset/lag"
          at="/market/asset/settlementLag"
          kind="count"
          unit="days"
          whole
        />
        <Field label="Tick" path="market/asset/tick" kind="price" />
      </div>
      <Field
        label="Calendars"
        path="market/asset/calendars"
        kind="text"
        whole
        hint="As EUTA USNY GBLO; empty is weekends only."
      />
      <Field
        label="Calendars of the settlement days"
        path="market/asset/lagCalendars"
        kind="text"
        whole
        hint="Empty: the same. “weekends” for none."
      />
      <Choice label="A maturity on a holiday" path="inquiry/roll" options={rolls} />
      <Field
        label="Further holidays"
        path="market/asset/holidays"
        kind="text"
        whole
        hint="Dates, apart by semicolons."
      />
      <Field label="Open all the same" path="market/asset/openDays" kind="text" whole />
      <h4>Settlement days that change</h4>
      <Rows
        name="Settlement days that change"
        rowName="Change"
        path="market/asset/laterLags"
        at="/market/asset/settlementLag"
        columns={lagColumns}
        before={1}
      />
    </Card>
  );
}
