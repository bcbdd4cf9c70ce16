import { RateConvention } from '../fields/conventions';
import { Field } from '../fields/field';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { twoSides } from './words';

export function FeeCard({ alwaysOpen }: CardView) {
  const { fee } = market.value;
  const none = fee.bid.trim() === '' && fee.offer.trim() === '';
  return (
    <Card
      id="fee"
      name="Lending fee"
      value={twoSides(fee.bid, fee.offer, '%')}
      summary={none ? 'the asset lends for nothing' : `${fee.compounding}, ${fee.dayCount}`}
      alwaysOpen={alwaysOpen}
    >
      <div class="field-row">
        <Field label="Bid: we earn" path="market/fee/bid" at="/market/lendingFee/bid/rate" kind="percent" unit="%" />
        <Field
          label="Offer: we pay"
          path="market/fee/offer"
          at="/market/lendingFee/offer/rate"
          kind="percent"
          unit="%"
        />
      </div>
      <RateConvention path="market/fee" at="/market/lendingFee" />
    </Card>
  );
}
