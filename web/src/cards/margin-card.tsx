import { Choice } from '../fields/choice';
import { Field } from '../fields/field';
import { marginKind } from '../model/build';
import type { MarginUnit } from '../model/request';
import { inquiry } from '../store/session';
import { Card, type CardView } from './card';
import { said } from './words';

const unitNames: Readonly<Record<MarginUnit, string>> = {
  price: 'in price',
  'bp-of-spot': 'bp of spot',
  'bp-per-year': 'bp of spot a year',
};

export function MarginCard({ alwaysOpen }: CardView) {
  const { margin } = inquiry.value;
  const none = margin.amount.trim() === '';
  return (
    <Card
      id="margin"
      name="Margin"
      value={none ? 'none' : said(margin.amount)}
      summary={none ? 'quoted at the break-evens' : `${unitNames[margin.unit]}, on each side`}
      alwaysOpen={alwaysOpen}
    >
      <div class="field-row">
        <Field label="Margin" path="inquiry/margin/amount" kind={marginKind(margin.unit)} />
        <Choice
          label="Unit"
          path="inquiry/margin/unit"
          options={Object.entries(unitNames).map(([value, name]) => ({ value, name }))}
        />
      </div>
    </Card>
  );
}
