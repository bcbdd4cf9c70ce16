/** The shape of a draft as it is kept and saved. */
import { emptyAnalysis, emptyCurve, emptyForwards, emptyInstruments, fixedKinds, models } from '../model/draft';
import type { Shape } from './shape';

const text = 'text';
const members = (of: Readonly<Record<string, Shape>>): Shape => ({ members: of });
const texts = (...names: readonly string[]): Readonly<Record<string, Shape>> =>
  Object.fromEntries(names.map((name) => [name, text]));
const rows = (of: Readonly<Record<string, Shape>>): Shape => ({ list: members({ id: 'number', ...of }) });

const compounding: Shape = { oneOf: ['continuous', 'simple', 'annual', 'semiannual', 'quarterly', 'monthly'] };
const convention = { compounding, dayCount: text } as const;
const rate = members({ rate: text, ...convention });
const pillars = members({
  quote: { oneOf: ['zero', 'factor'] },
  ...convention,
  interpolation: { oneOf: ['log-linear', 'linear-zero', 'monotone-cubic'] },
  rows: rows(texts('at', 'value')),
});
const laterText: Shape = { added: text, before: '' };
const instruments: Shape = {
  added: members({
    interpolation: { oneOf: ['log-linear', 'linear-zero', 'monotone-cubic'] },
    ...texts('calendars', 'spotLag', 'dayCount', 'swapDayCount'),
    holidays: laterText,
    openDays: laterText,
    payments: { oneOf: ['annual', 'semiannual', 'quarterly', 'monthly', 'at-end'] },
    rows: rows({ ...texts('type', 'tenor', 'rate'), dayCount: laterText, payments: laterText }),
    turns: rows(texts('from', 'to', 'spread')),
  }),
  before: emptyInstruments,
};
const fixedKind: Shape = { oneOf: fixedKinds };
const shortRate = members(texts('r0', 'meanReversion', 'longRun', 'volatility'));
/** A scenario has a curve of its own, which may have scenarios in turn. */
const scenario: Shape = {
  members: {
    id: 'number',
    weight: text,
    get curve(): Shape {
      return curve;
    },
  },
};
/** Scenarios of earlier versions held a flat rate or points alone: what makes a random curve is added to them. */
const random: Readonly<Record<Exclude<keyof typeof emptyCurve, 'kind' | 'flat' | 'pillars' | 'instruments'>, Shape>> = {
  model: { oneOf: models },
  vasicek: shortRate,
  coxIngersollRoss: shortRate,
  hoLee: members({ volatility: text, fit: fixedKind }),
  hullWhite: members({ meanReversion: text, volatility: text, fit: fixedKind }),
  meetings: members({ overnight: text, rows: rows({ date: text, moves: rows(texts('by', 'probability')) }) }),
  scenarios: members({ rows: { list: scenario } }),
  samples: members({ text, against: { added: { oneOf: ['', ...fixedKinds] }, before: '' } }),
};
const curve = members({
  kind: { oneOf: [...fixedKinds, 'random'] },
  flat: rate,
  pillars,
  instruments,
  ...Object.fromEntries(
    Object.entries(random).map(([name, added]) => [
      name,
      { added, before: emptyCurve[name as keyof typeof random] } satisfies Shape,
    ]),
  ),
});
const funding = members({ curve, lendSpread: text, borrowSpread: text });
const bothSides = members(texts('bid', 'offer'));

const forwards: Shape = {
  added: members({
    quoted: { oneOf: ['points', 'outright'] },
    scale: text,
    interpolation: { oneOf: ['log-linear', 'linear-zero', 'monotone-cubic'] },
    against: { oneOf: ['', ...fixedKinds] },
    rows: rows(texts('at', 'bid', 'offer')),
  }),
  before: emptyForwards,
};

/** Choices and texts of rows that earlier versions did not have: empty there. */
const lately = (oneOf: readonly string[]): Shape => ({ added: { oneOf }, before: '' });
const lateText: Shape = { added: text, before: '' };

const market = members({
  preset: lateText,
  asOf: text,
  asset: members({
    kind: { oneOf: ['share', 'index', 'currency-pair', 'commodity'] },
    ...texts('name', 'currency', 'base', 'lag', 'calendars', 'lagCalendars', 'holidays', 'openDays', 'tick'),
    laterLags: rows(texts('from', 'lag')),
  }),
  spot: bothSides,
  funding,
  discount: members({ same: 'flag', curve }),
  income: members({
    cash: rows({
      ...texts('ex', 'pay', 'amount', 'low', 'high'),
      status: lately(['', 'declared', 'estimated']),
      type: lately(['', 'ordinary', 'special']),
      treatment: lately(['', 'in-price', 'passed-through', 'adjusts-contract']),
      ...Object.fromEntries(['currency', 'forwardRate', 'passBid', 'passOffer'].map((name) => [name, lateText])),
    }),
    proportional: rows(texts('ex', 'fraction', 'low', 'high')),
    yieldIs: { added: { oneOf: ['rate', 'contracts'] }, before: 'rate' },
    yield: rate,
    contracts: forwards,
    passThrough: bothSides,
  }),
  fee: members({ ...texts('bid', 'offer'), ...convention }),
  hedgeCost: members(texts('buy', 'sell')),
  baseIs: { added: { oneOf: ['curve', 'forwards'] }, before: 'curve' },
  base: funding,
  baseForwards: forwards,
});

const inquiry = members({
  client: { oneOf: ['two-way', 'buys', 'sells'] },
  quantity: text,
  maturity: text,
  roll: { oneOf: ['', 'following', 'modified-following', 'preceding'] },
  margin: members({ unit: { oneOf: ['price', 'bp-of-spot', 'bp-per-year'] }, amount: text }),
});

export const draftShape: Shape = members({
  current: text,
  deals: { named: members({ inquiry, market, madeAt: text, validUntil: text, demonstration: 'flag' }) },
  tenors: members({ maturities: text }),
  analysis: {
    added: members({
      futures: members(texts('volatility', 'correlation')),
      cover: members(texts('growth', 'volatility', 'share', 'loading')),
      simulation: members({ method: { oneOf: ['quasi', 'pseudo'] }, ...texts('paths', 'seed') }),
      leftOut: { list: text },
      kept: { added: rows({ name: text, curve }), before: [] },
    }),
    before: emptyAnalysis,
  },
  agreed: rows({
    market: text,
    reference: text,
    client: { oneOf: ['bought', 'sold'] },
    price: text,
    quantity: text,
    maturity: text,
  }),
});
