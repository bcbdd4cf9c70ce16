import { fundingInWords } from '../model/funding-words';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { CurveEditor } from './curve-editor';
import { Spreads } from './funding-card';
import { curveValue, curveWords, said, spreadWords } from './words';

export function BaseCard({ alwaysOpen }: CardView) {
  const { base, asset } = market.value;
  return (
    <Card
      id="base"
      name={`Base curve, ${said(asset.base.toUpperCase())}`}
      value={curveValue(base.curve, fundingInWords(base.curve))}
      summary={`${curveWords(base.curve)}; ${spreadWords(base)}`}
      alwaysOpen={alwaysOpen}
    >
      <CurveEditor label="The base curve" path="market/base/curve" at="/market/base/curve" />
      <Spreads path="market/base" />
    </Card>
  );
}
