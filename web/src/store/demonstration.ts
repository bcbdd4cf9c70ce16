/** Four invented markets, one of each kind, with drafts of every kind of funding so that each is one click away. */
import commodity from '../../demonstration/commodity.json';
import forwards from '../../demonstration/forwards.json';
import funding from '../../demonstration/funding.json';
import index from '../../demonstration/index.json';
import pair from '../../demonstration/currency-pair.json';
import share from '../../demonstration/share.json';
import type { DecimalSign } from '../input/decimal';
import type { CurveDraft, DealDraft, Draft } from '../model/draft';
import { emptyAnalysis } from '../model/draft';
import { curveOnto, dealFrom, forwardsFrom, type QuotedForwards } from '../model/from-request';
import type { Curve, QuoteRequest } from '../model/request';

const hoursOfUse = { from: '08:40', until: '18:00' } as const;

function withEveryKind(curve: CurveDraft, currency: string, sign: DecimalSign): CurveDraft {
  const curves = (funding as unknown as Record<string, readonly Curve[]>)[currency] ?? [];
  const filled = curves.reduce((draft, from) => curveOnto(draft, from, sign), curve);
  return {
    ...filled,
    kind: curve.kind,
    model: curve.kind === 'random' ? curve.model : 'vasicek',
    ...(curve.kind === 'flat' ? { flat: curve.flat } : {}),
    ...(curve.kind === 'pillars' ? { pillars: curve.pillars } : {}),
  };
}

function demonstrated(request: QuoteRequest, sign: DecimalSign): DealDraft {
  const deal = dealFrom(request, sign);
  const { market } = deal;
  const { asset } = market;
  const day = request.market.asOf;
  const filled = (draft: DealDraft['market']['base'], currency: string): DealDraft['market']['base'] => ({
    ...draft,
    curve: withEveryKind(draft.curve, currency, sign),
  });
  const isPair = asset.kind === 'currency-pair';
  const quoted = forwardsFrom(forwards[asset.kind] as unknown as QuotedForwards, sign);
  return {
    ...deal,
    market: {
      ...market,
      funding: filled(market.funding, asset.currency),
      base: isPair ? filled(market.base, asset.base) : market.base,
      baseForwards: isPair ? { ...quoted, against: 'pillars' } : market.baseForwards,
      income: isPair ? market.income : { ...market.income, contracts: quoted },
      discount: { ...market.discount, curve: withEveryKind(market.discount.curve, asset.currency, sign) },
    },
    madeAt: `${day}T${hoursOfUse.from}`,
    validUntil: `${day}T${hoursOfUse.until}`,
    demonstration: true,
  };
}

export function demonstrationDraft(sign: DecimalSign): Draft {
  const requests = [share, index, pair, commodity] as unknown as readonly QuoteRequest[];
  const deals = Object.fromEntries(
    requests.map((request) => [(request.market.asset.name ?? '').replaceAll('/', ' '), demonstrated(request, sign)]),
  );
  return {
    current: Object.keys(deals)[0] ?? '',
    deals,
    tenors: { maturities: '1M 2M 3M 6M 9M 1Y 18M 2Y' },
    analysis: {
      ...emptyAnalysis,
      futures: { volatility: '25', correlation: sign === ',' ? '-0,3' : '-0.3' },
      cover: { growth: '6', volatility: '25', share: '60', loading: sign === ',' ? '0,1' : '0.1' },
    },
    agreed: [],
  };
}
