import { Segmented } from '../fields/choice';
import { isBlank, type QuotedForwardsDraft } from '../model/draft';
import { fundingInWords } from '../model/funding-words';
import { market } from '../store/session';
import { Card, type CardView } from './card';
import { CurveEditor } from './curve-editor';
import { FitEditor } from './fit-editor';
import { ForwardsEditor } from './forwards-editor';
import { Spreads } from './funding-card';
import { curveValue, curveWords, said, spreadWords } from './words';

/** How many forwards are quoted, and how far. */
export function forwardsWords({ rows }: QuotedForwardsDraft): string {
  const filled = rows.filter((row) => !isBlank(row));
  const last = filled.at(-1);
  return last === undefined ? 'none quoted yet' : `${filled.length} quoted to ${last.at.trim()}`;
}

export function BaseCard({ alwaysOpen }: CardView) {
  const { base, baseIs, baseForwards, asset } = market.value;
  const implied = baseIs === 'forwards';
  return (
    <Card
      id="base"
      name={`Base curve, ${said(asset.base.toUpperCase())}`}
      value={implied ? 'from forwards' : curveValue(base.curve, fundingInWords(base.curve))}
      summary={
        implied ? `${forwardsWords(baseForwards)}, both sides` : `${curveWords(base.curve)}; ${spreadWords(base)}`
      }
      alwaysOpen={alwaysOpen}
    >
      <Segmented
        label="The base currency’s interest is"
        path="market/baseIs"
        options={[
          { value: 'curve', name: 'From its curve' },
          { value: 'forwards', name: 'From forwards quoted' },
        ]}
      />
      {implied ? (
        <>
          <ForwardsEditor path="market/baseForwards" at="/market/base/curve" ofPair />
          <FitEditor
            curvePath="market/base/curve"
            fitPath="market/baseForwards/against"
            at="/market/base/curve/against"
            label="Held against the interest-rate curve"
            none="nothing"
          />
        </>
      ) : (
        <>
          <CurveEditor label="The base curve" path="market/base/curve" at="/market/base/curve" />
          <Spreads path="market/base" />
        </>
      )}
    </Card>
  );
}
