/**
 * From what was typed to the request. A text that cannot be read is sent as it stands, so that the core names it
 * among all the request's faults; the page's own sentence, which knows what may have been meant, is shown in its place.
 */
import { readMaturity, readDate, type DateStyle } from '../input/dates';
import type { DecimalSign } from '../input/decimal';
import { readSamples } from '../input/samples';
import { readNumber, type NumberKind } from '../input/quantities';
import type { Parsed } from '../input/parsed';
import type {
  CurveDraft,
  DealDraft,
  FixedCurveDraft,
  FixedKind,
  FundingDraft,
  InstrumentRow,
  InstrumentsDraft,
  KeptFunding,
  MarketDraft,
  PillarsDraft,
  QuotedForwardsDraft,
  QuotedRow,
  RateDraft,
  ShortRateDraft,
} from './draft';
import { isBlank, models } from './draft';
import { fundingInWords } from './funding-words';
import type { Curve, Funding, Market, QuoteRequest } from './request';
import type { Fault } from './view';

export interface Built<Request> {
  readonly request: Request;
  readonly faults: readonly Fault[];
}

export interface Writing {
  readonly sign: DecimalSign;
  readonly locale: string;
}

/** All blocks of a quote: the page shows every one of them, or prints it. */
export const everyBlock = ['income', 'sensitivities', 'ledger', 'random', 'bridge', 'total', 'working'] as const;

/** What stands in a request where a text could not be read: the text itself. */
type Sent<T> = T | string | undefined;

class Reader {
  readonly faults: Fault[] = [];
  private readonly dates: DateStyle;

  constructor(
    private readonly writing: Writing,
    asOf: string,
  ) {
    const read = readDate(asOf, { locale: writing.locale, after: '' });
    this.dates = { locale: writing.locale, after: read.ok ? read.value : '' };
  }

  number(text: string, kind: NumberKind, at: string): Sent<number> {
    return this.take(text, at, (typed) => readNumber(typed, kind, this.writing.sign));
  }

  date(text: string, at: string): Sent<string> {
    return this.take(text, at, (typed) => readDate(typed, this.dates));
  }

  /** Dates apart by semicolons or line ends. */
  dateList(text: string, at: string): readonly Sent<string>[] | undefined {
    const words = text.split(/[;\n]/).filter((word) => word.trim() !== '');
    return listOrNothing(words.map((word, index) => this.date(word, `${at}/${index}`)));
  }

  maturity(text: string, at: string): Sent<string> {
    return this.take(text, at, (typed) => readMaturity(typed, this.dates));
  }

  samples(text: string, at: string): object {
    const read = readSamples(text, this.dates, this.writing.sign);
    if (read.ok) return read.value;
    this.faults.push({ at: `${at}/factors`, code: read.code, message: read.message });
    return { dates: [], factors: [] };
  }

  private take<T>(text: string, at: string, read: (typed: string) => Parsed<T>): Sent<T> {
    if (text.trim() === '') return undefined;
    const parsed = read(text);
    if (parsed.ok) return parsed.value;
    this.faults.push({ at, code: parsed.code, message: parsed.message });
    return text.trim();
  }
}

/** Leaves out what has no value, as the contract's optional members are left out. */
function members(of: Readonly<Record<string, unknown>>): Record<string, unknown> | undefined {
  const kept = Object.entries(of).filter(([, value]) => value !== undefined);
  return kept.length === 0 ? undefined : Object.fromEntries(kept);
}

function sent<Row extends object, Out>(rows: readonly Row[], at: string, make: (row: Row, at: string) => Out): Out[] {
  return rows.filter((row) => !isBlank(row)).map((row, index) => make(row, `${at}/${index}`));
}

function listOrNothing<T>(list: readonly T[]): readonly T[] | undefined {
  return list.length === 0 ? undefined : list;
}

function rate(draft: RateDraft, at: string, read: Reader): object | undefined {
  const value = read.number(draft.rate, 'percent', `${at}/rate`);
  return value === undefined ? undefined : { rate: value, compounding: draft.compounding, dayCount: draft.dayCount };
}

/** A rate that must be there: left out, the core says so at its own place. */
function neededRate(draft: RateDraft, at: string, read: Reader): object {
  return rate(draft, at, read) ?? { compounding: draft.compounding, dayCount: draft.dayCount };
}

function pillars(draft: PillarsDraft, at: string, read: Reader): object {
  const zero = draft.quote === 'zero';
  return {
    kind: 'pillars',
    quote: draft.quote,
    ...(zero ? { compounding: draft.compounding, dayCount: draft.dayCount } : {}),
    interpolation: draft.interpolation,
    pillars: sent(draft.rows, `${at}/pillars`, (row, place) =>
      members({
        at: read.maturity(row.at, `${place}/at`),
        value: read.number(row.value, zero ? 'percent' : 'plain', `${place}/value`),
      }),
    ),
  };
}

/** The contract's name of what a person calls an instrument; what is not known goes as it stands, for the core to name. */
function instrumentType(text: string): string | undefined {
  const word = text.trim().toLowerCase();
  if (word === '') return undefined;
  if (/^(deposit|depo|depos|deposits|cash)$/.test(word)) return 'deposit';
  if (/^(fra|fras|forward rate agreement)$/.test(word)) return 'fra';
  if (/^(swap|swaps|ois|overnight[- ]swap|overnight[- ]index(ed)?[- ]swap)$/.test(word)) return 'overnight-swap';
  return text.trim();
}

/** `3x6`, `3x6M`, `3M-6M`, `3M x 6M` as two tenors. */
function twoTenors(text: string): readonly [string, string] | null {
  const match = /^(\d+)\s*([DWMY]?)\s*[x×/–-]\s*(\d+)\s*([DWMY]?)$/i.exec(text.trim());
  if (match === null) return null;
  const [, start = '', startUnit = '', end = '', endUnit = ''] = match;
  return [`${start}${(startUnit || endUnit || 'M').toUpperCase()}`, `${end}${(endUnit || 'M').toUpperCase()}`];
}

/** What a row says for itself, else what is said of its kind. */
function own(text: string, ofKind: string): string {
  return text.trim() === '' ? ofKind : text.trim();
}

function instrument(row: InstrumentRow, draft: InstrumentsDraft, at: string, read: Reader): object | undefined {
  const type = instrumentType(row.type);
  const tenor = row.tenor.trim() === '' ? undefined : row.tenor.trim().toUpperCase();
  const rate = read.number(row.rate, 'percent', `${at}/rate`);
  if (type === 'fra') {
    const both = twoTenors(row.tenor);
    return members({
      type,
      start: both?.[0] ?? tenor,
      end: both?.[1],
      rate,
      dayCount: own(row.dayCount, draft.dayCount),
    });
  }
  const swap = type === 'overnight-swap';
  return members({
    type,
    tenor,
    rate,
    dayCount: own(row.dayCount, swap ? draft.swapDayCount : draft.dayCount),
    payments: swap ? own(row.payments, draft.payments) : undefined,
  });
}

function instruments(draft: InstrumentsDraft, at: string, read: Reader): object {
  const turns = sent(draft.turns, `${at}/turns`, (row, place) =>
    members({
      from: read.date(row.from, `${place}/from`),
      to: read.date(row.to, `${place}/to`),
      spread: read.number(row.spread, 'basis-points', `${place}/spread`),
    }),
  );
  return {
    kind: 'instruments',
    interpolation: draft.interpolation,
    ...members({
      calendars: codes(draft.calendars),
      holidays: read.dateList(draft.holidays, `${at}/holidays`),
      openDays: read.dateList(draft.openDays, `${at}/openDays`),
      spotLag: read.number(draft.spotLag, 'count', `${at}/spotLag`),
      turns: listOrNothing(turns),
    }),
    items: sent(draft.rows, `${at}/items`, (row, place) => instrument(row, draft, place, read)),
  };
}

function fixedCurve(draft: FixedCurveDraft, at: string, read: Reader): object {
  switch (draft.kind) {
    case 'flat':
      return neededRate(draft.flat, at, read);
    case 'pillars':
      return pillars(draft.pillars, at, read);
    case 'instruments':
      return instruments(draft.instruments, at, read);
  }
}

/** One of a draft's own fixed curves. */
function ownFixedCurve(draft: CurveDraft, kind: FixedKind, at: string, read: Reader): object {
  const { flat, pillars: points, instruments: quoted } = draft;
  return fixedCurve({ kind, flat, pillars: points, instruments: quoted }, at, read);
}

function shortRate(model: string, draft: ShortRateDraft, volatility: NumberKind, at: string, read: Reader): object {
  return {
    kind: 'random',
    model,
    ...members({
      r0: read.number(draft.r0, 'percent', `${at}/r0`),
      meanReversion: read.number(draft.meanReversion, 'plain', `${at}/meanReversion`),
      longRun: read.number(draft.longRun, 'percent', `${at}/longRun`),
      volatility: read.number(draft.volatility, volatility, `${at}/volatility`),
    }),
  };
}

function randomCurve(draft: CurveDraft, at: string, read: Reader): object {
  switch (draft.model) {
    case 'vasicek':
      return shortRate('vasicek', draft.vasicek, 'percent', at, read);
    case 'cox-ingersoll-ross':
      return shortRate('cox-ingersoll-ross', draft.coxIngersollRoss, 'plain', at, read);
    case 'ho-lee':
    case 'hull-white': {
      const own = draft.model === 'ho-lee' ? draft.hoLee : draft.hullWhite;
      return {
        kind: 'random',
        model: draft.model,
        ...members({
          meanReversion:
            draft.model === 'hull-white'
              ? read.number(draft.hullWhite.meanReversion, 'plain', `${at}/meanReversion`)
              : undefined,
          volatility: read.number(own.volatility, 'percent', `${at}/volatility`),
          fit: ownFixedCurve(draft, own.fit, `${at}/fit`, read),
        }),
      };
    }
    case 'policy-meetings':
      return {
        kind: 'random',
        model: 'policy-meetings',
        ...members({ overnight: read.number(draft.meetings.overnight, 'percent', `${at}/overnight`) }),
        meetings: sent(draft.meetings.rows, `${at}/meetings`, (row, place) => ({
          ...members({ date: read.date(row.date, `${place}/date`) }),
          moves: sent(row.moves, `${place}/moves`, (move, movePlace) =>
            members({
              by: read.number(move.by, 'basis-points', `${movePlace}/by`),
              probability: read.number(move.probability, 'percent', `${movePlace}/probability`),
            }),
          ),
        })),
      };
    case 'scenarios':
      return {
        kind: 'random',
        model: 'scenarios',
        scenarios: draft.scenarios.rows.map((row, index) => ({
          ...members({ weight: read.number(row.weight, 'percent', `${at}/scenarios/${index}/weight`) }),
          curve: curve(row.curve, `${at}/scenarios/${index}/curve`, read),
        })),
      };
    case 'samples':
      return {
        kind: 'random',
        model: 'samples',
        ...read.samples(draft.samples.text, at),
        ...(draft.samples.against === ''
          ? {}
          : {
              against: ownFixedCurve(draft, draft.samples.against, `${at}/against`, read),
            }),
      };
  }
}

function curve(draft: CurveDraft, at: string, read: Reader): Curve {
  const made = draft.kind === 'random' ? randomCurve(draft, at, read) : ownFixedCurve(draft, draft.kind, at, read);
  return made as Curve;
}

function funding(draft: FundingDraft, at: string, read: Reader): Funding {
  return {
    curve: curve(draft.curve, `${at}/curve`, read),
    ...members({
      lendSpread: read.number(draft.lendSpread, 'basis-points', `${at}/lendSpread`),
      borrowSpread: read.number(draft.borrowSpread, 'basis-points', `${at}/borrowSpread`),
    }),
  };
}

/** Both sides of a quote; one figure, in the first column, stands for both. */
function quotedValue(row: QuotedRow, kind: NumberKind, at: string, read: Reader): unknown {
  if (row.offer.trim() === '' && row.bid.trim() !== '') return read.number(row.bid, kind, at);
  const [bid, offer] = [read.number(row.bid, kind, `${at}/bid`), read.number(row.offer, kind, `${at}/offer`)];
  return members({ bid, offer }) ?? {};
}

/** Forwards that the market quotes, in place of a curve or a yield. */
function forwards(draft: QuotedForwardsDraft, own: CurveDraft | null, at: string, read: Reader): object {
  const kind = draft.quoted === 'points' && own !== null ? 'plain' : 'price';
  return {
    kind: 'forwards',
    interpolation: draft.interpolation,
    ...(own === null
      ? {}
      : members({
          quoted: draft.quoted,
          scale: draft.quoted === 'points' ? read.number(draft.scale, 'plain', `${at}/scale`) : undefined,
          against: draft.against === '' ? undefined : ownFixedCurve(own, draft.against, `${at}/against`, read),
        })),
    rows: sent(draft.rows, `${at}/rows`, (row, place) => ({
      ...members({ at: read.maturity(row.at, `${place}/at`) }),
      value: quotedValue(row, kind, `${place}/value`, read),
    })),
  };
}

/** Codes apart by spaces or commas; `weekends` is the empty list. */
function codes(text: string): readonly string[] | undefined {
  const words = text.split(/[\s,;]+/).filter((word) => word !== '');
  if (words.length === 0) return undefined;
  if (words.length === 1 && words[0]?.toLowerCase() === 'weekends') return [];
  return words.map((word) => word.toUpperCase());
}

function settlementLag(draft: MarketDraft['asset'], at: string, read: Reader): unknown {
  const later = draft.laterLags.filter((row) => !isBlank(row));
  if (later.length === 0) return read.number(draft.lag, 'count', at);
  const first = { from: '1900-01-01', ...members({ lag: read.number(draft.lag, 'count', `${at}/0/lag`) }) };
  const rows = later.map((row, index) =>
    members({
      from: read.date(row.from, `${at}/${index + 1}/from`),
      lag: read.number(row.lag, 'count', `${at}/${index + 1}/lag`),
    }),
  );
  return [first, ...rows];
}

function asset(draft: MarketDraft['asset'], read: Reader): object {
  const at = '/market/asset';
  return {
    kind: draft.kind,
    ...members({
      name: draft.name.trim() === '' ? undefined : draft.name.trim(),
      currency: draft.currency.trim() === '' ? undefined : draft.currency.trim().toUpperCase(),
      base: draft.kind === 'currency-pair' && draft.base.trim() !== '' ? draft.base.trim().toUpperCase() : undefined,
      settlementLag: settlementLag(draft, `${at}/settlementLag`, read),
      calendars: codes(draft.calendars),
      lagCalendars: codes(draft.lagCalendars),
      holidays: read.dateList(draft.holidays, `${at}/holidays`),
      openDays: read.dateList(draft.openDays, `${at}/openDays`),
      tick: read.number(draft.tick, 'price', `${at}/tick`),
    }),
  };
}

function income(draft: MarketDraft['income'], read: Reader): object | undefined {
  const at = '/market/income';
  const cash = sent(draft.cash, `${at}/cash`, (row, place) =>
    members({
      ex: read.date(row.ex, `${place}/ex`),
      pay: read.date(row.pay, `${place}/pay`),
      amount: read.number(row.amount, 'price', `${place}/amount`),
      low: read.number(row.low, 'price', `${place}/low`),
      high: read.number(row.high, 'price', `${place}/high`),
      status: row.status || undefined,
      type: row.type || undefined,
      treatment: row.treatment || undefined,
      currency: row.currency.trim() === '' ? undefined : row.currency.trim().toUpperCase(),
      forwardRate: read.number(row.forwardRate, 'price', `${place}/forwardRate`),
      passThrough: members({
        bid: read.number(row.passBid, 'percent', `${place}/passThrough/bid`),
        offer: read.number(row.passOffer, 'percent', `${place}/passThrough/offer`),
      }),
    }),
  );
  const proportional = sent(draft.proportional, `${at}/proportional`, (row, place) =>
    members({
      ex: read.date(row.ex, `${place}/ex`),
      fraction: read.number(row.fraction, 'percent', `${place}/fraction`),
      low: read.number(row.low, 'percent', `${place}/low`),
      high: read.number(row.high, 'percent', `${place}/high`),
    }),
  );
  return members({
    cash: listOrNothing(cash),
    proportional: listOrNothing(proportional),
    yield:
      draft.yieldIs === 'contracts'
        ? forwards(draft.contracts, null, `${at}/yield`, read)
        : rate(draft.yield, `${at}/yield`, read),
    passThrough: members({
      bid: read.number(draft.passThrough.bid, 'percent', `${at}/passThrough/bid`),
      offer: read.number(draft.passThrough.offer, 'percent', `${at}/passThrough/offer`),
    }),
  });
}

function lendingFee(draft: MarketDraft['fee'], read: Reader): object | undefined {
  const side = (text: string, name: string): object | undefined =>
    rate({ rate: text, compounding: draft.compounding, dayCount: draft.dayCount }, `/market/lendingFee/${name}`, read);
  return members({ bid: side(draft.bid, 'bid'), offer: side(draft.offer, 'offer') });
}

function base(draft: MarketDraft, read: Reader): object {
  if (draft.baseIs === 'curve') return funding(draft.base, '/market/base', read);
  return { curve: forwards(draft.baseForwards, draft.base.curve, '/market/base/curve', read) };
}

function market(draft: MarketDraft, read: Reader): Market {
  const pair = draft.asset.kind === 'currency-pair';
  const made = {
    ...members({ asOf: read.date(draft.asOf, '/market/asOf') }),
    asset: asset(draft.asset, read),
    spot:
      members({
        bid: read.number(draft.spot.bid, 'price', '/market/spot/bid'),
        offer: read.number(draft.spot.offer, 'price', '/market/spot/offer'),
      }) ?? {},
    funding: funding(draft.funding, '/market/funding', read),
    ...members({
      discount: draft.discount.same ? undefined : curve(draft.discount.curve, '/market/discount', read),
      income: pair ? undefined : income(draft.income, read),
      lendingFee: pair ? undefined : lendingFee(draft.fee, read),
      hedgeCost: members({
        buy: read.number(draft.hedgeCost.buy, 'percent', '/market/hedgeCost/buy'),
        sell: read.number(draft.hedgeCost.sell, 'percent', '/market/hedgeCost/sell'),
      }),
      base: pair ? base(draft, read) : undefined,
    }),
  };
  return made as unknown as Market;
}

/** The kind of number that a margin's amount is. */
export function marginKind(unit: DealDraft['inquiry']['margin']['unit']): NumberKind {
  return unit === 'price' ? 'price' : 'margin-points';
}

/** The quote asked for, whole, and what could not be read of it. */
export function buildQuote(deal: DealDraft, writing: Writing): Built<QuoteRequest> {
  const read = new Reader(writing, deal.market.asOf);
  const { inquiry } = deal;
  const amount = read.number(inquiry.margin.amount, marginKind(inquiry.margin.unit), '/inquiry/margin/amount');
  const request = {
    format: 'forwright/1',
    task: 'quote',
    market: market(deal.market, read),
    inquiry: {
      client: inquiry.client,
      ...members({
        quantity: read.number(inquiry.quantity, 'amount', '/inquiry/quantity'),
        maturity: read.maturity(inquiry.maturity, '/inquiry/maturity'),
        roll: inquiry.roll === '' ? undefined : inquiry.roll,
        margin: amount === undefined ? undefined : { unit: inquiry.margin.unit, amount },
      }),
    },
    want: everyBlock,
  };
  return { request: request as unknown as QuoteRequest, faults: read.faults };
}

/** A way to fund the deal on screen that is typed in, with the curve that it makes. */
export interface FundingChoice {
  readonly key: string;
  readonly name: string;
  readonly curve: Curve;
}

/** Which of the kinds of funding have something typed in them, the one on screen first. */
export function fundingChoices(
  deal: DealDraft,
  kept: readonly KeptFunding[],
  writing: Writing,
): readonly FundingChoice[] {
  const { curve: whole } = deal.market.funding;
  const kinds: readonly Pick<CurveDraft, 'kind' | 'model'>[] = [
    { kind: 'flat', model: whole.model },
    { kind: 'pillars', model: whole.model },
    { kind: 'instruments', model: whole.model },
    ...models.map((model) => ({ kind: 'random' as const, model })),
  ];
  const keyOf = ({ kind, model }: Pick<CurveDraft, 'kind' | 'model'>): string => (kind === 'random' ? model : kind);
  const own = keyOf(whole);
  const read = (draft: CurveDraft): Curve =>
    curve(draft, '/market/funding/curve', new Reader(writing, deal.market.asOf));
  const standing = kinds
    .map((kind) => ({ ...whole, ...kind }))
    .filter((draft) => keyOf(draft) === own || isTyped(draft))
    .sort((one, other) => Number(keyOf(other) === own) - Number(keyOf(one) === own))
    .map((draft) => ({
      key: keyOf(draft),
      name: fundingInWords(draft),
      curve: read(draft),
    }));
  return [...standing, ...kept.map(({ id, name, curve: draft }) => ({ key: `kept ${id}`, name, curve: read(draft) }))];
}

function isTyped(draft: CurveDraft): boolean {
  if (draft.kind === 'flat') return draft.flat.rate.trim() !== '';
  if (draft.kind === 'pillars') return !draft.pillars.rows.every((row) => isBlank(row));
  if (draft.kind === 'instruments') return !draft.instruments.rows.every((row) => isBlank(row));
  const own = {
    vasicek: draft.vasicek.r0,
    'cox-ingersoll-ross': draft.coxIngersollRoss.r0,
    'ho-lee': draft.hoLee.volatility,
    'hull-white': draft.hullWhite.volatility,
    'policy-meetings': draft.meetings.overnight,
    scenarios: draft.scenarios.rows.map(({ weight }) => weight).join(''),
    samples: draft.samples.text,
  }[draft.model];
  return own.trim() !== '';
}
