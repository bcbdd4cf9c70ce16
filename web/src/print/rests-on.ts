/** What a quote rests on, in words, from the request that was answered. */
import { formatBasisPoints, formatDate, formatNumber, formatPercent, isIsoDate, thinSpace } from '../format';
import type { QuoteRequest } from '../model/view';

type Market = QuoteRequest['market'];
type Curve = Market['funding']['curve'];
type Rate = Exclude<Curve, { readonly kind: unknown }>;

export interface Line {
  readonly name: string;
  readonly words: string;
}

function rateWords(rate: Rate): string {
  if (typeof rate === 'number') return `${formatPercent(rate, 3)}, continuous, ACT/365.FIXED`;
  const { compounding = 'continuous', dayCount = 'ACT/365.FIXED' } = rate;
  return `${formatPercent(rate.rate, 3)}, ${compounding}, ${dayCount}`;
}

function when(at: string): string {
  return isIsoDate(at) ? formatDate(at) : at;
}

function modelWords(curve: Extract<Curve, { readonly kind: 'random' }>): string {
  switch (curve.model) {
    case 'vasicek':
    case 'cox-ingersoll-ross': {
      const name = curve.model === 'vasicek' ? 'Vasicek' : 'Cox–Ingersoll–Ross';
      return `random, ${name}: ${formatPercent(curve.r0, 3)} today, long run ${formatPercent(curve.longRun, 3)}, mean reversion ${formatNumber(curve.meanReversion)}, volatility ${formatPercent(curve.volatility, 3)}`;
    }
    case 'ho-lee':
      return `random, Ho–Lee: volatility ${formatPercent(curve.volatility, 3)} about ${curveWords(curve.fit)}`;
    case 'hull-white':
      return `random, Hull–White: mean reversion ${formatNumber(curve.meanReversion)}, volatility ${formatPercent(curve.volatility, 3)} about ${curveWords(curve.fit)}`;
    case 'policy-meetings':
      return `random: ${formatPercent(curve.overnight, 3)} overnight and ${curve.meetings.length} coming ${curve.meetings.length === 1 ? 'meeting' : 'meetings'} with their odds`;
    case 'scenarios':
      return `random: ${curve.scenarios.length} weighted scenarios`;
    case 'samples':
      return `random: ${formatNumber(curve.factors.length)} simulated paths brought from elsewhere`;
  }
}

/** A curve in a line. */
export function curveWords(curve: Curve): string {
  if (typeof curve === 'number' || !('kind' in curve)) return rateWords(curve);
  if (curve.kind === 'random') return modelWords(curve);
  if (curve.kind === 'instruments') {
    const count = curve.items.length === 1 ? '1 instrument' : `${curve.items.length} instruments`;
    const turns = curve.turns?.length ?? 0;
    return `curve from ${count}${turns === 0 ? '' : turns === 1 ? ', 1 jump' : `, ${turns} jumps`}`;
  }
  const first = curve.pillars[0];
  const last = curve.pillars.at(-1);
  if (!first || !last) return 'curve';
  const value = (pillar: typeof first) =>
    curve.quote === 'factor' ? formatNumber(pillar.value, 6) : formatPercent(pillar.value, 3);
  return `curve of ${curve.pillars.length} points, ${value(first)} at ${when(first.at)} to ${value(last)} at ${when(last.at)}, ${curve.interpolation ?? 'log-linear'}`;
}

function spreads({ lendSpread = 0, borrowSpread = 0 }: Market['funding']): string {
  return `lend ${formatBasisPoints(lendSpread, 1)}, borrow ${formatBasisPoints(borrowSpread, 1)} over it`;
}

function isTwoSided<T>(value: unknown): value is { readonly bid: T; readonly offer: T } {
  return typeof value === 'object' && value !== null && 'bid' in value && 'offer' in value;
}

function feeWords(fee: NonNullable<Market['lendingFee']>): string {
  if (isTwoSided<Rate>(fee)) return `bid ${rateWords(fee.bid)}; offer ${rateWords(fee.offer)}`;
  return rateWords(fee);
}

function incomeWords({ income }: Market): string {
  if (!income) return 'none';
  const parts: string[] = [];
  const { cash = [], proportional = [], passThrough } = income;
  if (cash.length > 0)
    parts.push(cash.map(({ ex, amount }) => `${formatNumber(amount)} ex ${formatDate(ex)}`).join(', '));
  if (proportional.length > 0)
    parts.push(proportional.map(({ ex, fraction }) => `${formatPercent(fraction, 3)} ex ${formatDate(ex)}`).join(', '));
  if (income.yield !== undefined)
    parts.push(
      typeof income.yield === 'object' && 'kind' in income.yield
        ? `a yield implied by ${income.yield.rows.length} listed contracts`
        : `yield ${rateWords(income.yield)}`,
    );
  if (passThrough !== undefined)
    parts.push(
      isTwoSided<number>(passThrough)
        ? `passed on: bid ${formatPercent(passThrough.bid, 1)}, offer ${formatPercent(passThrough.offer, 1)}`
        : `passed on: ${formatPercent(passThrough, 1)}`,
    );
  return parts.join('; ') || 'none';
}

type Implied = Extract<NonNullable<Market['base']>, { curve: { kind: 'forwards' } }>;

function isImplied(base: NonNullable<Market['base']>): base is Implied {
  return typeof base.curve === 'object' && 'kind' in base.curve && base.curve.kind === 'forwards';
}

/** Spot, rates, income, fee and hedge cost; what we lend and borrow at over the curve on the desk’s copy only. */
export function restsOn({ market }: QuoteRequest, forDesk: boolean): Line[] {
  const { spot, funding, lendingFee, hedgeCost, base, asset } = market;
  const spotWords = isTwoSided<number>(spot)
    ? `${formatNumber(spot.bid)}${thinSpace}/${thinSpace}${formatNumber(spot.offer)}`
    : formatNumber(spot);
  const rates = (curve: Market['funding']) =>
    forDesk ? `${curveWords(curve.curve)}; ${spreads(curve)}` : curveWords(curve.curve);
  const baseRates = (from: NonNullable<Market['base']>): string =>
    isImplied(from)
      ? `implied by ${from.curve.rows.length} forwards quoted, ${from.curve.quoted === 'points' ? 'in points' : 'outright'}`
      : rates(from);
  const lines: Line[] = [
    { name: 'Spot', words: `${asset.currency} ${spotWords}` },
    { name: 'Rates', words: rates(funding) },
  ];
  if (base) lines.push({ name: `Rates of ${asset.base ?? 'the base currency'}`, words: baseRates(base) });
  if (asset.kind !== 'currency-pair') {
    lines.push({ name: 'Income', words: incomeWords(market) });
    lines.push({ name: 'Lending fee', words: lendingFee === undefined ? 'none' : feeWords(lendingFee) });
  }
  const { buy = 0, sell = 0 } = hedgeCost ?? {};
  lines.push({
    name: 'Cost of the hedge',
    words:
      buy === 0 && sell === 0 ? 'none' : `buying ${formatPercent(buy, 3)}, selling ${formatPercent(sell, 3)} of spot`,
  });
  return lines;
}
