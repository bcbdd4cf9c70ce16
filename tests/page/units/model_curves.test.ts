import Ajv from 'ajv/dist/2020';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { readRows, type Column } from '../../../web/src/input/pasted-rows';
import { buildQuote } from '../../../web/src/model/build';
import type { DealDraft } from '../../../web/src/model/draft';
import { dealFrom } from '../../../web/src/model/from-request';
import type { Curve, Market, QuoteRequest } from '../../../web/src/model/request';
import { placeName } from '../../../web/src/panels/names';
import { restsOn } from '../../../web/src/print/rests-on';
import { readState, writeState } from '../../../web/src/files/state';
import { demonstrationDraft } from '../../../web/src/store/demonstration';
import { withValue } from '../../../web/src/store/paths';

const root = new URL('../../../', import.meta.url);
const schema = JSON.parse(readFileSync(new URL('core/contract/forwright-1.schema.json', root), 'utf8'));
const ajv = new Ajv({ strict: false, allErrors: true, validateFormats: false });
ajv.addSchema(schema);
const validate = ajv.compile({ $ref: `${schema.$id}#/$defs/Request` });

const british = { sign: '.', locale: 'en-GB' } as const;
const demonstration = demonstrationDraft('.');
const named = (name: string): DealDraft =>
  Object.values(demonstration.deals).find((deal) => deal.market.asset.kind === name)!;

type OfPair = Extract<NonNullable<Market['base']>['curve'], { kind: 'forwards' }>;
type Listed = Extract<NonNullable<Market['income']>['yield'], { kind: 'forwards' }>;

function valid(deal: DealDraft): QuoteRequest {
  const { request, faults } = buildQuote(deal, british);
  expect(faults).toEqual([]);
  validate(request);
  expect(validate.errors).toBeNull();
  return request;
}

describe('instruments as a person writes them', () => {
  const withRows = (rows: readonly (readonly [string, string, string])[]): DealDraft =>
    withValue(
      withValue(named('share'), 'market/funding/curve/kind', 'instruments'),
      'market/funding/curve/instruments/rows',
      rows.map(([type, tenor, rate], index) => ({ id: index + 1, type, tenor, rate, dayCount: '', payments: '' })),
    );
  const itemsOf = (deal: DealDraft) =>
    (valid(deal).market.funding.curve as Extract<Curve, { kind: 'instruments' }>).items;

  test('have the names of the trade, whatever their letters', () => {
    const items = itemsOf(
      withRows([
        ['Depo', 'on', '2.05'],
        ['cash', '1m', '2.1'],
        ['FRA', '3x6', '2.2'],
        ['fra', '6M-9M', '2.25'],
        ['OIS', '2y', '2.4'],
        ['overnight-swap', '5Y', '280 bp'],
      ]),
    );
    expect(items.map(({ type }) => type)).toEqual([
      'deposit',
      'deposit',
      'fra',
      'fra',
      'overnight-swap',
      'overnight-swap',
    ]);
    expect(items[0]).toMatchObject({ tenor: 'ON', rate: 0.0205 });
    expect(items[2]).toMatchObject({ start: '3M', end: '6M', rate: 0.022 });
    expect(items[3]).toMatchObject({ start: '6M', end: '9M' });
    expect(items[5]).toMatchObject({ tenor: '5Y', rate: 0.028 });
  });

  test('keep conventions of their own through a file, each at its row', () => {
    const curve: Curve = {
      kind: 'instruments',
      calendars: ['EUTA'],
      holidays: ['2027-05-06'],
      items: [
        { type: 'deposit', tenor: '1M', rate: 0.02, dayCount: 'ACT/360' },
        { type: 'deposit', tenor: '3M', rate: 0.021, dayCount: 'ACT/365.FIXED' },
        { type: 'overnight-swap', tenor: '2Y', rate: 0.022, dayCount: 'ACT/360', payments: 'annual' },
        { type: 'overnight-swap', tenor: '5Y', rate: 0.024, dayCount: '30E/360', payments: 'quarterly' },
      ],
    };
    const request = JSON.parse(readFileSync(new URL('web/demonstration/share.json', root), 'utf8')) as QuoteRequest;
    const deal = dealFrom({ ...request, market: { ...request.market, funding: { curve } } }, '.');
    const back = valid(deal).market.funding.curve as Extract<Curve, { kind: 'instruments' }>;
    expect(back.items).toEqual(curve.items);
    expect(back.holidays).toEqual(curve.holidays);
  });

  test('saved before rows had conventions of their own, are opened all the same', () => {
    const kept = JSON.parse(writeState(demonstration, '.'));
    for (const deal of Object.values<any>(kept.draft.deals)) {
      delete deal.market.baseIs;
      delete deal.market.baseForwards;
      delete deal.market.income.yieldIs;
      delete deal.market.income.contracts;
      for (const row of deal.market.funding.curve.instruments.rows) {
        delete row.dayCount;
        delete row.payments;
      }
    }
    const read = readState(kept, '.');
    expect(read.ok ? '' : read.message).toBe('');
    if (read.ok) valid(Object.values(read.value.deals)[0]!);
  });
});

describe('quoted forwards', () => {
  test('of a pair make its base curve, one figure standing for both sides', () => {
    const rows = [
      { id: 1, at: 'sn', bid: '0.5', offer: '' },
      { id: 2, at: '1M', bid: '15.1', offer: '15.9' },
      { id: 3, at: '', bid: '', offer: '' },
      { id: 4, at: '17 Mar 27', bid: '\u22122', offer: '1' },
    ];
    const deal = withValue(
      withValue(named('currency-pair'), 'market/baseIs', 'forwards'),
      'market/baseForwards/rows',
      rows,
    );
    const { base } = valid(deal).market;
    const curve = base?.curve as OfPair;
    expect(curve.quoted).toBe('points');
    expect(curve.rows).toEqual([
      { at: 'SN', value: 0.5 },
      { at: '1M', value: { bid: 15.1, offer: 15.9 } },
      { at: '2027-03-17', value: { bid: -2, offer: 1 } },
    ]);
    expect(curve.against).toMatchObject({ kind: 'pillars' });
    expect(base).not.toHaveProperty('lendSpread');
  });

  test('of a share, an index or a commodity make its yield', () => {
    for (const kind of ['share', 'index', 'commodity']) {
      const deal = withValue(named(kind), 'market/income/yieldIs', 'contracts');
      const curve = valid(deal).market.income?.yield as Listed;
      expect(curve).not.toHaveProperty('quoted');
      expect(curve.rows.length).toBeGreaterThan(3);
      expect(curve).not.toHaveProperty('against');
      expect(curve).not.toHaveProperty('scale');
    }
  });

  test.each(['currency-pair', 'index'])('of a %s come back from a request the same', (kind) => {
    const pair = kind === 'currency-pair';
    const deal = pair
      ? withValue(named(kind), 'market/baseIs', 'forwards')
      : withValue(named(kind), 'market/income/yieldIs', 'contracts');
    const request = valid(deal);
    const again = valid(dealFrom(request, '.'));
    expect(again.market).toEqual(request.market);
    expect(again.inquiry).toEqual(request.inquiry);
  });

  test('what is wrong in them is named at its cell', () => {
    const rows = [{ id: 1, at: 'soon', bid: 'x', offer: '16' }];
    const deal = withValue(
      withValue(named('currency-pair'), 'market/baseIs', 'forwards'),
      'market/baseForwards/rows',
      rows,
    );
    expect(buildQuote(deal, british).faults.map(({ at }) => at)).toEqual([
      '/market/base/curve/rows/0/at',
      '/market/base/curve/rows/0/value/bid',
    ]);
  });

  test('are named by their dates, in a line and one by one', () => {
    const request = valid(withValue(named('currency-pair'), 'market/baseIs', 'forwards'));
    expect(placeName(request, '/market/base/curve/rows/2/value')).toBe('Forward 3M');
    expect(restsOn(request, false).map(({ words }) => words)).toContain('implied by 6 forwards quoted, in points');
    const listed = valid(withValue(named('index'), 'market/income/yieldIs', 'contracts'));
    expect(placeName(listed, '/market/income/yield/rows/0/value')).toBe('Contract 18 Dec 26');
  });

  test('paste with their short names, tenors and dates', () => {
    const columns: readonly Column[] = [
      { name: 'at', holds: 'date-or-tenor', like: /^(ON|TN|SN)$/i, called: ['tenor', 'date'] },
      { name: 'bid', holds: 'plain', called: ['bid'] },
      { name: 'offer', holds: 'plain', called: ['offer', 'ask'] },
    ];
    const read = (text: string) => readRows(text, columns, { locale: 'en-GB', after: '2026-12-01' }, '.');
    const wanted = [
      { at: 'SN', bid: '0.5', offer: '0.6' },
      { at: '1M', bid: '-15.9', offer: '-15.1' },
      { at: '17 Mar 27', bid: '46', offer: '47' },
    ];
    expect(read('SN\t0.5\t0.6\n1M\t-15.9\t-15.1\n2027-03-17\t46\t47')).toEqual(wanted);
    expect(read('Ask;Tenor;Bid\n0,6;SN;0,5\n-15,1;1M;-15,9\n47;17.03.2027;46')).toEqual(wanted);
  });
});
