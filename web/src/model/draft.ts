/**
 * What the person has typed, as typed. Every value is text; each kind of funding keeps its own draft, so that
 * switching to another and back loses nothing. Values are never changed in place.
 */
import type { AssetKind, Compounding, MarginUnit } from './request';
import type { Client } from './answer';

export interface RateDraft {
  readonly rate: string;
  readonly compounding: Compounding;
  readonly dayCount: string;
}
export interface PillarRow {
  readonly id: number;
  readonly at: string;
  readonly value: string;
}
export type Interpolation = 'log-linear' | 'linear-zero' | 'monotone-cubic';
export interface PillarsDraft {
  readonly quote: 'zero' | 'factor';
  readonly compounding: Compounding;
  readonly dayCount: string;
  readonly interpolation: Interpolation;
  readonly rows: readonly PillarRow[];
}
export interface InstrumentRow {
  readonly id: number;
  /** `deposit`, `FRA`, `swap`, as the person writes it. */
  readonly type: string;
  /** `3M`, `ON`; of a forward rate agreement `3M-6M` or `3x6`. */
  readonly tenor: string;
  readonly rate: string;
  /** Its own day count and payments, where they are not those of its kind. */
  readonly dayCount: string;
  readonly payments: string;
}
export interface TurnRow {
  readonly id: number;
  readonly from: string;
  readonly to: string;
  readonly spread: string;
}
/** What a money market quotes, and a curve is made from. */
export interface InstrumentsDraft {
  readonly interpolation: Interpolation;
  readonly calendars: string;
  readonly holidays: string;
  readonly openDays: string;
  readonly spotLag: string;
  /** Of deposits and forward rate agreements, and of swaps' fixed sides. */
  readonly dayCount: string;
  readonly swapDayCount: string;
  readonly payments: 'annual' | 'semiannual' | 'quarterly' | 'monthly' | 'at-end';
  readonly rows: readonly InstrumentRow[];
  readonly turns: readonly TurnRow[];
}
export const fixedKinds = ['flat', 'pillars', 'instruments'] as const;
export type FixedKind = (typeof fixedKinds)[number];
/** A curve that is not random: one rate, points, or what instruments make of it. */
export interface FixedCurveDraft {
  readonly instruments: InstrumentsDraft;
  readonly kind: FixedKind;
  readonly flat: RateDraft;
  readonly pillars: PillarsDraft;
}
export interface ShortRateDraft {
  readonly r0: string;
  readonly meanReversion: string;
  readonly longRun: string;
  readonly volatility: string;
}
export interface MoveRow {
  readonly id: number;
  readonly by: string;
  readonly probability: string;
}
export interface MeetingRow {
  readonly id: number;
  readonly date: string;
  readonly moves: readonly MoveRow[];
}
export interface ScenarioRow {
  readonly id: number;
  readonly weight: string;
  /** Any curve, a random one too. */
  readonly curve: CurveDraft;
}
export const models = [
  'vasicek',
  'cox-ingersoll-ross',
  'ho-lee',
  'hull-white',
  'policy-meetings',
  'scenarios',
  'samples',
] as const;
export type ModelName = (typeof models)[number];
export type CurveKind = FixedKind | 'random';

export interface CurveDraft {
  readonly kind: CurveKind;
  readonly model: ModelName;
  readonly flat: RateDraft;
  readonly pillars: PillarsDraft;
  readonly instruments: InstrumentsDraft;
  readonly vasicek: ShortRateDraft;
  readonly coxIngersollRoss: ShortRateDraft;
  /** `fit` says which of this draft's own fixed curves the model is fitted to. */
  readonly hoLee: { readonly volatility: string; readonly fit: FixedKind };
  readonly hullWhite: {
    readonly meanReversion: string;
    readonly volatility: string;
    readonly fit: FixedKind;
  };
  readonly meetings: { readonly overnight: string; readonly rows: readonly MeetingRow[] };
  readonly scenarios: { readonly rows: readonly ScenarioRow[] };
  /** A heading of dates, then one row of factors a path, as pasted. */
  readonly samples: {
    readonly text: string;
    /** Which of this draft's own fixed curves they are held against; empty for none. */
    readonly against: '' | FixedKind;
  };
}
export interface FundingDraft {
  readonly curve: CurveDraft;
  readonly lendSpread: string;
  readonly borrowSpread: string;
}
export interface QuotedRow {
  readonly id: number;
  readonly at: string;
  readonly bid: string;
  readonly offer: string;
}
/** Forwards that the market quotes, from which what the asset earns is implied. */
export interface QuotedForwardsDraft {
  /** Of a pair; another asset's are listed contracts, quoted outright. */
  readonly quoted: 'points' | 'outright';
  readonly scale: string;
  readonly interpolation: Interpolation;
  /** Which of the base currency's own fixed curves it is held against; empty for none. */
  readonly against: '' | FixedKind;
  readonly rows: readonly QuotedRow[];
}
export interface CashRow {
  readonly id: number;
  readonly ex: string;
  readonly pay: string;
  readonly amount: string;
  readonly low: string;
  readonly high: string;
  readonly status: '' | 'declared' | 'estimated';
  readonly type: '' | 'ordinary' | 'special';
  readonly treatment: '' | 'in-price' | 'passed-through' | 'adjusts-contract';
  /** Of the amounts, where it is not the asset's, with what one of it is worth on the day of payment. */
  readonly currency: string;
  readonly forwardRate: string;
  /** Of this distribution alone. */
  readonly passBid: string;
  readonly passOffer: string;
}
export interface ProportionalRow {
  readonly id: number;
  readonly ex: string;
  readonly fraction: string;
  readonly low: string;
  readonly high: string;
}
export interface LagRow {
  readonly id: number;
  readonly from: string;
  readonly lag: string;
}
export interface MarketDraft {
  /** Which of the usual ways the sheet was filled with; empty for none. */
  readonly preset: string;
  readonly asOf: string;
  readonly asset: {
    readonly kind: AssetKind;
    readonly name: string;
    readonly currency: string;
    readonly base: string;
    readonly lag: string;
    readonly laterLags: readonly LagRow[];
    readonly calendars: string;
    readonly lagCalendars: string;
    /** Further days without business, and days with business whatever the calendars say, apart by semicolons. */
    readonly holidays: string;
    readonly openDays: string;
    readonly tick: string;
  };
  readonly spot: { readonly bid: string; readonly offer: string };
  readonly funding: FundingDraft;
  /** Whether what is already agreed is discounted at the funding curve. */
  readonly discount: { readonly same: boolean; readonly curve: CurveDraft };
  readonly income: {
    readonly cash: readonly CashRow[];
    readonly proportional: readonly ProportionalRow[];
    /** Whether the yield is typed, or implied by listed contracts. */
    readonly yieldIs: 'rate' | 'contracts';
    readonly yield: RateDraft;
    readonly contracts: QuotedForwardsDraft;
    readonly passThrough: { readonly bid: string; readonly offer: string };
  };
  readonly fee: {
    readonly bid: string;
    readonly offer: string;
    readonly compounding: Compounding;
    readonly dayCount: string;
  };
  readonly hedgeCost: { readonly buy: string; readonly sell: string };
  /** Whether the base currency has a curve, or one implied by its forwards. */
  readonly baseIs: 'curve' | 'forwards';
  readonly base: FundingDraft;
  readonly baseForwards: QuotedForwardsDraft;
}
export interface InquiryDraft {
  readonly client: Client;
  readonly quantity: string;
  readonly maturity: string;
  readonly roll: '' | 'following' | 'modified-following' | 'preceding';
  readonly margin: { readonly unit: MarginUnit; readonly amount: string };
}
/** One asset's market and what is asked of it. */
export interface DealDraft {
  readonly inquiry: InquiryDraft;
  readonly market: MarketDraft;
  /** When the market was taken down, `2026-12-01T08:40`, and until when it may be used; empty where not said. */
  readonly madeAt: string;
  readonly validUntil: string;
  readonly demonstration: boolean;
}
export interface AgreedRow {
  readonly id: number;
  /** Which of the deals' markets it stands in. */
  readonly market: string;
  readonly reference: string;
  readonly client: 'bought' | 'sold';
  readonly price: string;
  readonly quantity: string;
  readonly maturity: string;
}
/** A funding put by, to be compared with others of its own kind too. */
export interface KeptFunding {
  readonly id: number;
  readonly name: string;
  readonly curve: CurveDraft;
}
/** What is asked beyond the quote, of whichever deal is on screen. */
export interface AnalysisDraft {
  readonly futures: { readonly volatility: string; readonly correlation: string };
  readonly cover: {
    readonly growth: string;
    readonly volatility: string;
    readonly share: string;
    readonly loading: string;
  };
  readonly simulation: { readonly method: 'quasi' | 'pseudo'; readonly paths: string; readonly seed: string };
  /** Kinds of funding that are not to be compared. */
  readonly leftOut: readonly string[];
  readonly kept: readonly KeptFunding[];
}
/** Everything that is kept, undone and saved. */
export interface Draft {
  readonly current: string;
  readonly deals: Readonly<Record<string, DealDraft>>;
  readonly tenors: { readonly maturities: string };
  readonly analysis: AnalysisDraft;
  readonly agreed: readonly AgreedRow[];
}

export const emptyRate: RateDraft = { rate: '', compounding: 'continuous', dayCount: 'ACT/365.FIXED' };
export const emptyPillars: PillarsDraft = {
  quote: 'zero',
  compounding: 'continuous',
  dayCount: 'ACT/365.FIXED',
  interpolation: 'log-linear',
  rows: [],
};
export const emptyInstruments: InstrumentsDraft = {
  interpolation: 'log-linear',
  calendars: '',
  holidays: '',
  openDays: '',
  spotLag: '',
  dayCount: 'ACT/360',
  swapDayCount: 'ACT/360',
  payments: 'annual',
  rows: [],
  turns: [],
};
const emptyShortRate: ShortRateDraft = { r0: '', meanReversion: '', longRun: '', volatility: '' };
export const emptyCurve: CurveDraft = {
  kind: 'flat',
  model: 'vasicek',
  flat: emptyRate,
  pillars: emptyPillars,
  instruments: emptyInstruments,
  vasicek: emptyShortRate,
  coxIngersollRoss: emptyShortRate,
  hoLee: { volatility: '', fit: 'flat' },
  hullWhite: { meanReversion: '', volatility: '', fit: 'flat' },
  meetings: { overnight: '', rows: [] },
  scenarios: { rows: [] },
  samples: { text: '', against: '' },
};
export const emptyForwards: QuotedForwardsDraft = {
  quoted: 'points',
  scale: '',
  interpolation: 'log-linear',
  against: '',
  rows: [],
};
export const emptyFunding: FundingDraft = { curve: emptyCurve, lendSpread: '', borrowSpread: '' };
export const emptyDeal: DealDraft = {
  inquiry: {
    client: 'two-way',
    quantity: '',
    maturity: '',
    roll: '',
    margin: { unit: 'bp-of-spot', amount: '' },
  },
  market: {
    preset: '',
    asOf: '',
    asset: {
      kind: 'share',
      name: '',
      currency: '',
      base: '',
      lag: '',
      laterLags: [],
      calendars: '',
      lagCalendars: '',
      holidays: '',
      openDays: '',
      tick: '',
    },
    spot: { bid: '', offer: '' },
    funding: emptyFunding,
    discount: { same: true, curve: emptyCurve },
    income: {
      cash: [],
      proportional: [],
      yieldIs: 'rate',
      yield: emptyRate,
      contracts: emptyForwards,
      passThrough: { bid: '', offer: '' },
    },
    fee: { bid: '', offer: '', compounding: 'continuous', dayCount: 'ACT/365.FIXED' },
    hedgeCost: { buy: '', sell: '' },
    baseIs: 'curve',
    base: emptyFunding,
    baseForwards: emptyForwards,
  },
  madeAt: '',
  validUntil: '',
  demonstration: false,
};

export const emptyAnalysis: AnalysisDraft = {
  futures: { volatility: '', correlation: '' },
  cover: { growth: '', volatility: '', share: '', loading: '' },
  simulation: { method: 'quasi', paths: '65536', seed: '1' },
  leftOut: [],
  kept: [],
};

/** An id that no row of the list has. */
export function nextId(rows: readonly { readonly id: number }[]): number {
  return rows.reduce((largest, row) => Math.max(largest, row.id), 0) + 1;
}

/** Whether nothing stands in a row: such a row is not sent. */
export function isBlank(row: object): boolean {
  return Object.entries(row).every(([name, value]) => {
    if (name === 'id') return true;
    if (typeof value === 'string') return value.trim() === '';
    if (Array.isArray(value)) return value.every((inner) => isBlank(inner as object));
    return false;
  });
}

/** The index in the request of each row, blank rows having none. */
export function sentIndexes(rows: readonly object[]): readonly (number | null)[] {
  let sent = 0;
  return rows.map((row) => (isBlank(row) ? null : sent++));
}
