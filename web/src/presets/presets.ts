/**
 * What is usual where an asset is dealt, to fill the sheet with: each figure stays the person's to change. Sources stand
 * beside them; what is the trade's habit without one says so.
 */
import type { AssetKind } from '../model/request';

/** A field of the deal, by its path, and what it is usually set to. */
export interface Usual {
  readonly path: string;
  readonly value: unknown;
  /** What it is called where it has been changed. */
  readonly what: string;
}

export interface Preset {
  readonly id: string;
  readonly name: string;
  readonly kinds: readonly AssetKind[];
  readonly usual: readonly Usual[];
  readonly sources: readonly string[];
}

const shares: readonly AssetKind[] = ['share', 'index'];
const practice = 'Money-market day counts and simple interest: common practice.';
const twoDays = 'Settlement after two business days: common practice of the market (from memory).';
const oneDayPlanned =
  'Two business days by Regulation (EU) No 909/2014, article 5(2); one is planned from 11 October 2027.';

/** The day count of a currency's money market (common practice of the trade). */
const moneyDayCount: Readonly<Record<string, string>> = {
  USD: 'ACT/360',
  EUR: 'ACT/360',
  CHF: 'ACT/360',
  GBP: 'ACT/365.FIXED',
  HKD: 'ACT/365.FIXED',
  AUD: 'ACT/365.FIXED',
  CAD: 'ACT/365.FIXED',
  JPY: 'ACT/365.FIXED',
};

function money(path: string, currency: string, centre: string): readonly Usual[] {
  const dayCount = moneyDayCount[currency] ?? 'ACT/360';
  const what = `${currency} interest`;
  return [
    { path: `${path}/curve/flat/compounding`, value: 'simple', what },
    { path: `${path}/curve/flat/dayCount`, value: dayCount, what },
    { path: `${path}/curve/instruments/dayCount`, value: dayCount, what },
    { path: `${path}/curve/instruments/swapDayCount`, value: dayCount, what },
    { path: `${path}/curve/instruments/calendars`, value: centre, what },
    { path: `${path}/curve/instruments/spotLag`, value: currency === 'GBP' ? '0' : '2', what },
  ];
}

function settlement(lag: string, later: readonly { from: string; lag: string }[]): readonly Usual[] {
  return [
    { path: 'market/asset/lag', value: lag, what: 'settlement' },
    {
      path: 'market/asset/laterLags',
      value: later.map((row, index) => ({ id: index + 1, ...row })),
      what: 'settlement that changes',
    },
  ];
}

function calendars(all: string, ofLag: string): readonly Usual[] {
  return [
    { path: 'market/asset/calendars', value: all, what: 'calendars' },
    { path: 'market/asset/lagCalendars', value: ofLag, what: 'calendars of the settlement days' },
  ];
}

function duty(buy: string, sell: string): readonly Usual[] {
  return [
    { path: 'market/hedgeCost/buy', value: buy, what: 'cost of buying' },
    { path: 'market/hedgeCost/sell', value: sell, what: 'cost of selling' },
  ];
}

interface ShareMarket {
  readonly id: string;
  readonly name: string;
  readonly currency: string;
  readonly centres: readonly [all: string, ofLag: string];
  readonly money: string;
  readonly lag: string;
  readonly later?: readonly { readonly from: string; readonly lag: string }[];
  readonly duty?: readonly [buy: string, sell: string];
  readonly sources: readonly string[];
}

const planned = [{ from: '11 Oct 27', lag: '1' }];
const shareMarkets: readonly ShareMarket[] = [
  {
    id: 'shares-us',
    name: 'Shares, United States',
    currency: 'USD',
    centres: ['NYSE', 'US-SECURITIES'],
    money: 'USNY',
    lag: '1',
    sources: ['One business day since 28 May 2024: SEC Rule 15c6-1(a).'],
  },
  {
    id: 'shares-euro',
    name: 'Shares, euro area',
    currency: 'EUR',
    centres: ['EUTA', ''],
    money: 'EUTA',
    lag: '2',
    later: planned,
    sources: [oneDayPlanned],
  },
  {
    id: 'shares-france',
    name: 'Shares, France, with its transaction tax',
    currency: 'EUR',
    centres: ['EUTA', ''],
    money: 'EUTA',
    lag: '2',
    later: planned,
    duty: ['0.4', ''],
    sources: [
      oneDayPlanned,
      'Transaction tax on buying, 0.4 % since 1 April 2025: Code général des impôts, article 235 ter ZD (from memory); which shares it falls on changes each year.',
    ],
  },
  {
    id: 'shares-uk',
    name: 'Shares, United Kingdom',
    currency: 'GBP',
    centres: ['GBLO', ''],
    money: 'GBLO',
    lag: '2',
    later: planned,
    duty: ['0.5', ''],
    sources: [
      'Two business days; one is planned from 11 October 2027.',
      'Stamp duty reserve tax on buying, 0.5 %: Finance Act 1986, section 87; dealers with relief pay none.',
    ],
  },
  {
    id: 'shares-switzerland',
    name: 'Shares, Switzerland',
    currency: 'CHF',
    centres: ['CHZU', ''],
    money: 'CHZU',
    lag: '2',
    sources: [twoDays],
  },
  {
    id: 'shares-japan',
    name: 'Shares, Japan',
    currency: 'JPY',
    centres: ['JPTO', ''],
    money: 'JPTO',
    lag: '2',
    sources: [twoDays],
  },
  {
    id: 'shares-hong-kong',
    name: 'Shares, Hong Kong',
    currency: 'HKD',
    centres: ['HKHK', ''],
    money: 'HKHK',
    lag: '2',
    duty: ['0.1', '0.1'],
    sources: [twoDays, 'Stamp duty, 0.1 % on each side: Stamp Duty Ordinance (Cap. 117), from memory.'],
  },
  {
    id: 'shares-canada',
    name: 'Shares, Canada',
    currency: 'CAD',
    centres: ['CATO', ''],
    money: 'CATO',
    lag: '1',
    sources: ['One business day since 27 May 2024: National Instrument 24-101 (from memory).'],
  },
  {
    id: 'shares-australia',
    name: 'Shares, Australia',
    currency: 'AUD',
    centres: ['AUSY', ''],
    money: 'AUSY',
    lag: '2',
    sources: [twoDays],
  },
];

interface Pair {
  readonly base: string;
  readonly quote: string;
  readonly centres: readonly [base: string, quote: string];
  readonly lag: string;
}

const pairs: readonly Pair[] = [
  { base: 'EUR', quote: 'USD', centres: ['EUTA', 'USNY'], lag: '2' },
  { base: 'GBP', quote: 'USD', centres: ['GBLO', 'USNY'], lag: '2' },
  { base: 'AUD', quote: 'USD', centres: ['AUSY', 'USNY'], lag: '2' },
  { base: 'USD', quote: 'JPY', centres: ['USNY', 'JPTO'], lag: '2' },
  { base: 'USD', quote: 'CHF', centres: ['USNY', 'CHZU'], lag: '2' },
  { base: 'USD', quote: 'CAD', centres: ['USNY', 'CATO'], lag: '1' },
  { base: 'USD', quote: 'HKD', centres: ['USNY', 'HKHK'], lag: '2' },
  { base: 'EUR', quote: 'GBP', centres: ['EUTA', 'GBLO'], lag: '2' },
  { base: 'EUR', quote: 'JPY', centres: ['EUTA', 'JPTO'], lag: '2' },
  { base: 'EUR', quote: 'CHF', centres: ['EUTA', 'CHZU'], lag: '2' },
];

function presetOfShares(market: ShareMarket): Preset {
  const [all, ofLag] = market.centres;
  const [buy, sell] = market.duty ?? ['', ''];
  return {
    id: market.id,
    name: market.name,
    kinds: shares,
    usual: [
      { path: 'market/asset/currency', value: market.currency, what: 'currency' },
      ...settlement(market.lag, market.later ?? []),
      ...calendars(all, ofLag),
      ...duty(buy, sell),
      ...money('market/funding', market.currency, market.money),
    ],
    sources: [...market.sources, practice],
  };
}

/** The dollar's own holidays do not delay spot, but spot is good in both centres. */
function lagCentres({ base, quote, centres }: Pair): string {
  if (base === 'USD') return centres[1];
  return quote === 'USD' ? centres[0] : '';
}

function presetOfPair(pair: Pair): Preset {
  const { base, quote, centres, lag } = pair;
  return {
    id: `pair-${base}-${quote}`.toLowerCase(),
    name: `${base}/${quote}`,
    kinds: ['currency-pair'],
    usual: [
      { path: 'market/asset/base', value: base, what: 'base currency' },
      { path: 'market/asset/currency', value: quote, what: 'currency' },
      ...settlement(lag, []),
      ...calendars(centres.join(' '), lagCentres(pair)),
      ...money('market/funding', quote, centres[1]),
      ...money('market/base', base, centres[0]),
      { path: 'market/baseForwards/scale', value: quote === 'JPY' ? '100' : '10000', what: 'scale of points' },
    ],
    sources: [
      `Spot after ${lag === '1' ? 'one business day' : 'two business days'}; a holiday of the dollar’s own before spot does not delay it; points in ${quote === 'JPY' ? 'hundredths' : 'ten-thousandths'}: common practice.`,
      practice,
    ],
  };
}

export const presets: readonly Preset[] = [...shareMarkets.map(presetOfShares), ...pairs.map(presetOfPair)];
