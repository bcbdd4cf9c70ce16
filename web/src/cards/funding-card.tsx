import { Field } from '../fields/field';
import { formatPrice } from '../format';
import { fundingInWords } from '../model/funding-words';
import { previous, quoteAnswer } from '../model/view';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { CurveEditor } from './curve-editor';
import { curveValue, curveWords, spreadWords } from './words';

/** What switching funding did to the fair forward, where the quote that says so is not on screen. */
function Switched() {
  const before = previous.value;
  const { good, stale } = quoteAnswer.value;
  if (before === null || good === null || stale) return null;
  const { tick } = good.request.market.asset;
  return (
    <p class="notice switched">
      {before.was} → {before.now}: fair {formatPrice(before.result.fair, tick)} → {formatPrice(good.result.fair, tick)}
    </p>
  );
}

export function Spreads({ path }: { readonly path: string }) {
  return (
    <div class="field-row">
      <Field label="We lend at" path={`${path}/lendSpread`} kind="basis-points" unit="bp over" />
      <Field label="We borrow at" path={`${path}/borrowSpread`} kind="basis-points" unit="bp over" />
    </div>
  );
}

export function FundingCard({ alwaysOpen }: CardView) {
  const { funding } = market.value;
  const kind = fundingInWords(funding.curve);
  return (
    <Card
      id="funding"
      name="Funding"
      value={curveValue(funding.curve, kind)}
      summary={`${curveWords(funding.curve)}; ${spreadWords(funding)}`}
      alwaysOpen={alwaysOpen}
    >
      <CurveEditor label="Funding" path="market/funding/curve" at="/market/funding/curve" />
      <Spreads path="market/funding" />
      {alwaysOpen && <Switched />}
    </Card>
  );
}
