import { Field } from '../fields/field';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { said } from './words';

export function HedgeCostCard({ alwaysOpen }: CardView) {
  const { buy, sell } = market.value.hedgeCost;
  const none = buy.trim() === '' && sell.trim() === '';
  return (
    <Card
      id="hedge-cost"
      name="Hedge cost"
      value={none ? 'none' : `${said(buy === '' ? '0' : buy)} / ${said(sell === '' ? '0' : sell, '%')}`}
      summary={none ? 'no duty, tax or commission' : 'to buy / to sell, of spot'}
      alwaysOpen={alwaysOpen}
    >
      <div class="field-row">
        <Field label="To buy" path="market/hedgeCost/buy" kind="percent" unit="% of spot" />
        <Field label="To sell" path="market/hedgeCost/sell" kind="percent" unit="% of spot" />
      </div>
      <p class="field-hint">Duty, tax and commission on dealing the hedge today.</p>
    </Card>
  );
}
