import { describe, expect, it } from 'vitest';
import { bridgeName } from '../../../web/src/charts/bridge-names';
import type { QuoteRequest } from '../../../web/src/model/view';
import { at, placeName } from '../../../web/src/panels/names';
import { curveWords, restsOn } from '../../../web/src/print/rests-on';
import { priceInWords } from '../../../web/src/quote/words';

const request: QuoteRequest = {
  format: 'forwright/1',
  task: 'quote',
  market: {
    asOf: '2026-12-01',
    asset: { kind: 'share', name: 'Brackwater Mills', currency: 'EUR', tick: 0.01 },
    spot: { bid: 48.62, offer: 48.66 },
    funding: {
      curve: {
        kind: 'random',
        model: 'policy-meetings',
        overnight: 0.02,
        meetings: [{ date: '2027-03-11', moves: [{ by: -0.0025, probability: 1 }] }],
      },
      lendSpread: -0.001,
    },
    income: { cash: [{ ex: '2027-06-09', amount: 0.55 }] },
  },
  inquiry: { client: 'two-way', quantity: 10000, maturity: '2027-12-15' },
};

describe('places in the request', () => {
  it('are found by RFC 6901 pointers', () => {
    // RFC 6901, section 5: "/a~1b" is the member a/b, "/m~0n" the member m~n.
    expect(at({ 'a/b': 1, 'm~n': 8 }, '/a~1b')).toBe(1);
    expect(at({ 'a/b': 1, 'm~n': 8 }, '/m~0n')).toBe(8);
    expect(at(request, '/market/income/cash/0/amount')).toBe(0.55);
    expect(at(request, '/market/none/at/all')).toBeUndefined();
  });

  it('have names that a person knows', () => {
    expect(placeName(request, '/market/income/cash/0/amount')).toBe('Income ex 9 Jun 27');
    expect(placeName(request, '/market/funding/curve/meetings/0/moves/0/by')).toBe(
      'Meeting 11 Mar 27: \u221225\u202fbp',
    );
    expect(placeName(request, '/market/funding/curve/volatility')).toBe('Volatility');
    expect(placeName(request, '/market/funding/curve/scenarios/1/curve/rate')).toBe('Scenario 2: rate');
    const pillars = {
      kind: 'pillars' as const,
      pillars: [
        { at: '1Y', value: 0.03 },
        { at: '2028-06-30', value: 0.03 },
      ],
    };
    const curve = { ...request, market: { ...request.market, funding: { curve: pillars } } };
    expect(placeName(curve, '/market/funding/curve/pillars/0/value')).toBe('Pillar 1Y');
    expect(placeName(curve, '/market/funding/curve/pillars/1/value')).toBe('Pillar 30 Jun 28');
  });

  it('and parts of the bridge have theirs, by side', () => {
    expect(bridgeName('side', 'bid')).toBe('To the bid side');
    expect(bridgeName('quote', 'offer')).toBe('Our offer');
    expect(bridgeName('some-new-part', 'offer')).toBe('Some new part');
  });
});

describe('what a quote rests on', () => {
  it('keeps what we lend and borrow at from the client', () => {
    const words = (forDesk: boolean) =>
      restsOn(request, forDesk)
        .map(({ words }) => words)
        .join(' ');
    expect(words(true)).toContain('lend');
    expect(words(false)).not.toContain('lend');
  });

  it('says every kind of curve in a line', () => {
    expect(curveWords(0.03)).toBe('3.000\u202f%, continuous, ACT/365.FIXED');
    expect(curveWords({ rate: 0.0275, compounding: 'simple', dayCount: 'ACT/360' })).toBe(
      '2.750\u202f%, simple, ACT/360',
    );
    expect(curveWords({ kind: 'random', model: 'ho-lee', volatility: 0.01, fit: 0.03 })).toContain('Ho–Lee');
    expect(curveWords(request.market.funding.curve)).toContain('1 coming meeting ');
  });
});

describe('the price as text', () => {
  it('names both sides, the dates, and that it is indicative', () => {
    const result = {
      dates: { maturity: '2027-12-15', settlement: '2027-12-17' },
      carry: { spot: 48.64 },
      quote: { bid: 47.64, offer: 48.46 },
    } as Parameters<typeof priceInWords>[1];
    expect(priceInWords(request, result)).toBe(
      '10,000 shares of Brackwater Mills; forward to Wed 15 Dec 2027, settling Fri 17 Dec 2027; EUR: We bid 47.64 (client sells), We offer 48.46 (client buys); indicative until the desk confirms',
    );
  });
});
