import { Field } from '../fields/field';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { said, twoSides } from './words';

export function SpotCard({ alwaysOpen }: CardView) {
  const { asset, spot, asOf } = market.value;
  const currency = asset.currency.toUpperCase();
  return (
    <Card
      id="spot"
      name="Spot"
      value={twoSides(spot.bid, spot.offer)}
      summary={`${said(currency)}, as of ${said(asOf)}`}
      alwaysOpen={alwaysOpen}
    >
      <div class="field-row">
        <Field label="Bid" path="market/spot/bid" kind="price" unit={currency} />
        <Field label="Offer" path="market/spot/offer" kind="price" unit={currency} />
      </div>
      <Field label="As of (day of dealing)" path="market/asOf" kind="date" placeholder="1 Dec 26" />
    </Card>
  );
}
