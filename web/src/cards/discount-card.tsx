import { fundingInWords } from '../model/funding-words';
import { edit, market } from '../store/session';
import { Card, type CardView } from './card';
import { CurveEditor } from './curve-editor';
import { curveValue, curveWords } from './words';

export function DiscountCard({ alwaysOpen }: CardView) {
  const { discount } = market.value;
  return (
    <Card
      id="discount"
      name="Discounting"
      value={discount.same ? 'as funding' : curveValue(discount.curve, fundingInWords(discount.curve))}
      summary={discount.same ? 'of forwards already agreed' : curveWords(discount.curve)}
      alwaysOpen={alwaysOpen}
    >
      <label class="check">
        <input
          type="checkbox"
          checked={discount.same}
          data-path="market/discount/same"
          onChange={(event) => edit('market/discount/same', event.currentTarget.checked)}
        />
        <span>Discount agreed forwards at the funding curve</span>
      </label>
      {!discount.same && <CurveEditor label="Discounting" path="market/discount/curve" at="/market/discount" />}
    </Card>
  );
}
