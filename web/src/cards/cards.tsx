/** The cards of a market, in the order in which they are changed. */
import type { FunctionComponent } from 'preact';
import { market } from '../store/session';
import { BaseCard } from './base-card';
import type { CardView } from './card';
import { ConventionsCard } from './conventions-card';
import { DiscountCard } from './discount-card';
import { FeeCard } from './fee-card';
import { FundingCard } from './funding-card';
import { HedgeCostCard } from './hedge-cost-card';
import { IncomeCard } from './income-card';
import { MarginCard } from './margin-card';
import { SpotCard } from './spot-card';

interface Listed {
  readonly id: string;
  readonly view: FunctionComponent<CardView>;
  /** The request members and draft paths whose fields lie in it. */
  readonly covers: readonly string[];
}

const listed: readonly Listed[] = [
  { id: 'spot', view: SpotCard, covers: ['market/spot', 'market/asOf'] },
  { id: 'funding', view: FundingCard, covers: ['market/funding'] },
  { id: 'base', view: BaseCard, covers: ['market/base'] },
  { id: 'income', view: IncomeCard, covers: ['market/income'] },
  { id: 'fee', view: FeeCard, covers: ['market/lendingFee', 'market/fee'] },
  { id: 'hedge-cost', view: HedgeCostCard, covers: ['market/hedgeCost'] },
  { id: 'margin', view: MarginCard, covers: ['inquiry/margin'] },
  { id: 'discount', view: DiscountCard, covers: ['market/discount'] },
  { id: 'conventions', view: ConventionsCard, covers: ['market', 'inquiry/roll'] },
];

/** The card in which the field of a request member or draft path lies. */
export function cardOf(place: string): string | null {
  const path = place.replace(/^\//, '');
  const card = listed.find(({ covers }) => covers.some((start) => path === start || path.startsWith(`${start}/`)));
  return card?.id ?? null;
}

export function Cards({ alwaysOpen }: CardView) {
  const pair = market.value.asset.kind === 'currency-pair';
  return (
    <>
      {listed
        .filter(({ id }) => (pair ? id !== 'income' && id !== 'fee' : id !== 'base'))
        .map(({ id, view: View }) => (
          <View key={id} alwaysOpen={alwaysOpen} />
        ))}
    </>
  );
}
