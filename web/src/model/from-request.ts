/** From a request to the texts that would make it: how demonstrations, market sheets and recorded quotes are opened. */
import { fromNumber, grouped, toText, type DecimalSign } from '../input/decimal';
import { placesOf, type NumberKind } from '../input/quantities';
import { dateToText } from '../input/step';
import type { Curve, Funding, Market, QuoteRequest, Rate } from './request';
import type {
  CurveDraft,
  DealDraft,
  FixedCurveDraft,
  FundingDraft,
  MarketDraft,
  QuotedForwardsDraft,
  RateDraft,
} from './draft';
import { emptyCurve, emptyDeal, emptyFunding } from './draft';
import { marginKind } from './build';

class Writer {
  constructor(private readonly sign: DecimalSign) {}

  number(value: number | undefined, kind: NumberKind): string {
    if (value === undefined) return '';
    const text = toText(fromNumber(value), this.sign, -placesOf(kind));
    return kind === 'amount' ? grouped(text, this.sign) : text;
  }

  date(value: string | undefined): string {
    return value === undefined ? '' : dateToText(value);
  }
}

function rate(from: Rate, write: Writer): RateDraft {
  const whole = typeof from === 'number' ? { rate: from } : from;
  return {
    rate: write.number(whole.rate, 'percent'),
    compounding: whole.compounding ?? 'continuous',
    dayCount: whole.dayCount ?? 'ACT/365.FIXED',
  };
}

function pillars(from: Extract<Curve, { kind: 'pillars' }>, write: Writer): FixedCurveDraft['pillars'] {
  const quote = from.quote ?? 'zero';
  return {
    quote,
    compounding: from.compounding ?? 'continuous',
    dayCount: from.dayCount ?? 'ACT/365.FIXED',
    interpolation: from.interpolation ?? 'log-linear',
    rows: from.pillars.map((pillar, index) => ({
      id: index + 1,
      at: write.date(pillar.at),
      value: write.number(pillar.value, quote === 'zero' ? 'percent' : 'plain'),
    })),
  };
}

type FixedCurve = Exclude<Curve, { kind: 'random' }>;

const instrumentNames = { deposit: 'deposit', fra: 'FRA', 'overnight-swap': 'swap' } as const;

/**
 * The page has one day count for deposits and forward rate agreements and one for swaps, the first of each; others
 * stand in their rows.
 */
function instruments(from: Extract<Curve, { kind: 'instruments' }>, write: Writer): FixedCurveDraft['instruments'] {
  const swap = from.items.find((item) => item.type === 'overnight-swap');
  const other = from.items.find((item) => item.type !== 'overnight-swap');
  const dayCount = other?.dayCount ?? 'ACT/360';
  const swapDayCount = swap?.dayCount ?? 'ACT/360';
  const payments = swap?.payments ?? 'annual';
  const own = (text: string, ofKind: string): string => (text === ofKind ? '' : text);
  return {
    interpolation: from.interpolation ?? 'log-linear',
    calendars: from.calendars === undefined ? '' : from.calendars.length === 0 ? 'weekends' : from.calendars.join(' '),
    holidays: (from.holidays ?? []).map(dateToText).join('; '),
    openDays: (from.openDays ?? []).map(dateToText).join('; '),
    spotLag: write.number(from.spotLag, 'count'),
    dayCount,
    swapDayCount,
    payments,
    rows: from.items.map((item, index) => ({
      id: index + 1,
      type: instrumentNames[item.type],
      tenor: item.type === 'fra' ? `${item.start}-${item.end}` : item.tenor,
      rate: write.number(item.rate, 'percent'),
      dayCount: own(item.dayCount ?? 'ACT/360', item.type === 'overnight-swap' ? swapDayCount : dayCount),
      payments: item.type === 'overnight-swap' ? own(item.payments ?? 'annual', payments) : '',
    })),
    turns: (from.turns ?? []).map((turn, index) => ({
      id: index + 1,
      from: write.date(turn.from),
      to: write.date(turn.to),
      spread: write.number(turn.spread, 'basis-points'),
    })),
  };
}

function fixed(from: FixedCurve, write: Writer): Partial<Pick<FixedCurveDraft, 'flat' | 'pillars' | 'instruments'>> {
  if (typeof from === 'number' || !('kind' in from)) return { flat: rate(from, write) };
  if (from.kind === 'instruments') return { instruments: instruments(from, write) };
  return { pillars: pillars(from, write) };
}

function kindOf(from: FixedCurve): FixedCurveDraft['kind'] {
  return typeof from === 'number' || !('kind' in from) ? 'flat' : from.kind;
}

function onto(draft: CurveDraft, from: Curve, write: Writer): CurveDraft {
  if (typeof from === 'number' || !('kind' in from) || from.kind !== 'random')
    return { ...draft, kind: kindOf(from), ...fixed(from, write) };
  const random = { ...draft, kind: 'random' as const, model: from.model };
  switch (from.model) {
    case 'vasicek':
    case 'cox-ingersoll-ross': {
      const parameters = {
        r0: write.number(from.r0, 'percent'),
        meanReversion: write.number(from.meanReversion, 'plain'),
        longRun: write.number(from.longRun, 'percent'),
        volatility: write.number(from.volatility, from.model === 'vasicek' ? 'percent' : 'plain'),
      };
      return from.model === 'vasicek'
        ? { ...random, vasicek: parameters }
        : { ...random, coxIngersollRoss: parameters };
    }
    case 'ho-lee':
    case 'hull-white': {
      const withFit = { ...random, ...fixed(from.fit, write) };
      const fit = kindOf(from.fit);
      const volatility = write.number(from.volatility, 'percent');
      return from.model === 'ho-lee'
        ? { ...withFit, hoLee: { volatility, fit } }
        : { ...withFit, hullWhite: { volatility, fit, meanReversion: write.number(from.meanReversion, 'plain') } };
    }
    case 'policy-meetings':
      return {
        ...random,
        meetings: {
          overnight: write.number(from.overnight, 'percent'),
          rows: from.meetings.map((meeting, index) => ({
            id: index + 1,
            date: write.date(meeting.date),
            moves: meeting.moves.map((move, place) => ({
              id: place + 1,
              by: write.number(move.by, 'basis-points'),
              probability: write.number(move.probability, 'percent'),
            })),
          })),
        },
      };
    case 'scenarios':
      return {
        ...random,
        scenarios: {
          rows: from.scenarios.map((scenario, index) => ({
            id: index + 1,
            weight: write.number(scenario.weight, 'percent'),
            curve: onto(emptyCurve, scenario.curve, write),
          })),
        },
      };
    case 'samples':
      return {
        ...random,
        ...(from.against === undefined ? {} : fixed(from.against as FixedCurve, write)),
        samples: {
          against: from.against === undefined ? '' : kindOf(from.against as FixedCurve),
          text: [
            from.dates.map(dateToText),
            ...from.factors.map((row) => row.map((factor) => write.number(factor, 'plain'))),
          ]
            .map((row) => row.join('\t'))
            .join('\n'),
        },
      };
  }
}

function funding(from: Funding | undefined, before: FundingDraft, write: Writer): FundingDraft {
  if (from === undefined) return before;
  return {
    curve: onto(before.curve, from.curve, write),
    lendSpread: write.number(from.lendSpread, 'basis-points'),
    borrowSpread: write.number(from.borrowSpread, 'basis-points'),
  };
}

function both<T>(value: T | { readonly bid: T; readonly offer: T }): { readonly bid: T; readonly offer: T } {
  return typeof value === 'object' && value !== null && 'bid' in value ? value : { bid: value, offer: value };
}

type Forwards = Extract<NonNullable<NonNullable<Market['income']>['yield']>, { kind: 'forwards' }>;
type PairForwards = Extract<NonNullable<Market['base']>['curve'], { kind: 'forwards' }>;

function isForwards<T>(value: T): value is Extract<T, { readonly kind: 'forwards' }> {
  return typeof value === 'object' && value !== null && 'kind' in value && value.kind === 'forwards';
}

export type QuotedForwards = Forwards | PairForwards;

function forwards(from: QuotedForwards, write: Writer): QuotedForwardsDraft {
  const pair = 'quoted' in from ? from : null;
  const kind = pair?.quoted === 'points' ? 'plain' : 'price';
  return {
    quoted: pair?.quoted ?? 'outright',
    scale: write.number(pair?.scale, 'plain'),
    interpolation: from.interpolation ?? 'log-linear',
    against: pair?.against === undefined ? '' : kindOf(pair.against as FixedCurve),
    rows: from.rows.map((row, index) => {
      const { bid, offer } = both<number>(row.value);
      const one = typeof row.value === 'number';
      return {
        id: index + 1,
        at: write.date(row.at),
        bid: write.number(bid, kind),
        offer: one ? '' : write.number(offer, kind),
      };
    }),
  };
}

/** The base currency's curve, or its forwards and what they are held against. */
function base(from: Market['base'], write: Writer): Pick<MarketDraft, 'baseIs' | 'base' | 'baseForwards'> {
  const { market } = emptyDeal;
  const curve = from?.curve;
  if (!isForwards(curve))
    return {
      baseIs: 'curve',
      base: funding(from as Funding | undefined, emptyFunding, write),
      baseForwards: market.baseForwards,
    };
  const against = curve.against === undefined ? {} : fixed(curve.against as FixedCurve, write);
  return {
    baseIs: 'forwards',
    base: { ...emptyFunding, curve: { ...emptyCurve, ...against } },
    baseForwards: forwards(curve, write),
  };
}

function asset(from: Market['asset'], write: Writer): MarketDraft['asset'] {
  const lags = from.settlementLag ?? 2;
  const [first, ...later] = typeof lags === 'number' ? [{ from: '', lag: lags }] : lags;
  const codes = (list: readonly string[] | undefined): string =>
    list === undefined ? '' : list.length === 0 ? 'weekends' : list.join(' ');
  return {
    kind: from.kind,
    name: from.name ?? '',
    currency: from.currency,
    base: from.base ?? '',
    lag: write.number(first?.lag, 'count'),
    laterLags: later.map((row, index) => ({
      id: index + 1,
      from: write.date(row.from),
      lag: write.number(row.lag, 'count'),
    })),
    calendars: codes(from.calendars),
    lagCalendars: codes(from.lagCalendars),
    holidays: (from.holidays ?? []).map(dateToText).join('; '),
    openDays: (from.openDays ?? []).map(dateToText).join('; '),
    tick: write.number(from.tick, 'price'),
  };
}

function income(from: Market['income'], write: Writer): MarketDraft['income'] {
  if (from === undefined) return emptyDeal.market.income;
  const pass = from.passThrough === undefined ? undefined : both(from.passThrough);
  return {
    cash: (from.cash ?? []).map((row, index) => ({
      id: index + 1,
      ex: write.date(row.ex),
      pay: write.date(row.pay),
      amount: write.number(row.amount, 'price'),
      low: write.number(row.low, 'price'),
      high: write.number(row.high, 'price'),
      status: row.status ?? '',
      type: row.type ?? '',
      treatment: row.treatment ?? '',
      currency: row.currency ?? '',
      forwardRate: write.number(row.forwardRate, 'price'),
      passBid: write.number(row.passThrough === undefined ? undefined : both<number>(row.passThrough).bid, 'percent'),
      passOffer: write.number(
        row.passThrough === undefined ? undefined : both<number>(row.passThrough).offer,
        'percent',
      ),
    })),
    proportional: (from.proportional ?? []).map((row, index) => ({
      id: index + 1,
      ex: write.date(row.ex),
      fraction: write.number(row.fraction, 'percent'),
      low: write.number(row.low, 'percent'),
      high: write.number(row.high, 'percent'),
    })),
    ...(isForwards(from.yield)
      ? { yieldIs: 'contracts' as const, yield: emptyDeal.market.income.yield, contracts: forwards(from.yield, write) }
      : {
          yieldIs: 'rate' as const,
          yield: from.yield === undefined ? emptyDeal.market.income.yield : rate(from.yield, write),
          contracts: emptyDeal.market.income.contracts,
        }),
    passThrough: { bid: write.number(pass?.bid, 'percent'), offer: write.number(pass?.offer, 'percent') },
  };
}

function fee(from: Market['lendingFee'], write: Writer): MarketDraft['fee'] {
  if (from === undefined) return emptyDeal.market.fee;
  const sides = both<Rate>(from);
  const [bid, offer] = [rate(sides.bid, write), rate(sides.offer, write)];
  return { bid: bid.rate, offer: offer.rate, compounding: bid.compounding, dayCount: bid.dayCount };
}

/** The texts of a market; drafts of the kinds of funding that it does not use are left empty. */
export function marketFrom(from: Market, sign: DecimalSign): MarketDraft {
  const write = new Writer(sign);
  const spot = both(from.spot);
  return {
    preset: '',
    asOf: write.date(from.asOf),
    asset: asset(from.asset, write),
    spot: { bid: write.number(spot.bid, 'price'), offer: write.number(spot.offer, 'price') },
    funding: funding(from.funding, emptyFunding, write),
    discount:
      from.discount === undefined
        ? emptyDeal.market.discount
        : { same: false, curve: onto(emptyCurve, from.discount, write) },
    income: income(from.income, write),
    fee: fee(from.lendingFee, write),
    hedgeCost: {
      buy: write.number(from.hedgeCost?.buy, 'percent'),
      sell: write.number(from.hedgeCost?.sell, 'percent'),
    },
    ...base(from.base, write),
  };
}

/** The texts of a curve put over a draft, which keeps its other kinds. */
export function curveOnto(draft: CurveDraft, from: Curve, sign: DecimalSign): CurveDraft {
  return onto(draft, from, new Writer(sign));
}

/** The texts of quoted forwards. */
export function forwardsFrom(from: QuotedForwards, sign: DecimalSign): QuotedForwardsDraft {
  return forwards(from, new Writer(sign));
}

/** The texts of a whole quote request. */
export function dealFrom(request: QuoteRequest, sign: DecimalSign): DealDraft {
  const write = new Writer(sign);
  const { inquiry } = request;
  const unit = inquiry.margin?.unit ?? 'price';
  return {
    ...emptyDeal,
    inquiry: {
      client: inquiry.client,
      quantity: write.number(inquiry.quantity, 'amount'),
      maturity: write.date(inquiry.maturity),
      roll: inquiry.roll ?? '',
      margin: { unit, amount: write.number(inquiry.margin?.amount, marginKind(unit)) },
    },
    market: marketFrom(request.market, sign),
  };
}
