import Ajv from 'ajv/dist/2020';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { buildQuote } from '../../../web/src/model/build';
import { models } from '../../../web/src/model/draft';
import { dealFrom } from '../../../web/src/model/from-request';
import { withOtherSign } from '../../../web/src/model/number-texts';
import type { QuoteRequest } from '../../../web/src/model/request';
import { demonstrationDraft } from '../../../web/src/store/demonstration';
import { withValue } from '../../../web/src/store/paths';
import { readState, writeState } from '../../../web/src/files/state';

const root = new URL('../../../', import.meta.url);
const schema = JSON.parse(readFileSync(new URL('core/contract/forwright-1.schema.json', root), 'utf8'));
const ajv = new Ajv({ strict: false, allErrors: true, validateFormats: false });
ajv.addSchema(schema);
const validate = ajv.compile({ $ref: `${schema.$id}#/$defs/Request` });

const british = { sign: '.', locale: 'en-GB' } as const;
const german = { sign: ',', locale: 'de-DE' } as const;
const demonstration = demonstrationDraft('.');
const deals = Object.entries(demonstration.deals);
const [, share] = deals[0]!;

function demonstrationFile(name: string): QuoteRequest {
  return JSON.parse(readFileSync(new URL(`web/demonstration/${name}.json`, root), 'utf8')) as QuoteRequest;
}

/** Order of members aside. */
function same(one: unknown, two: unknown): void {
  expect(JSON.parse(JSON.stringify(one))).toEqual(JSON.parse(JSON.stringify(two)));
}

describe('the request that a draft makes', () => {
  test.each(deals)('of the demonstration %s is one of the contract', (_, deal) => {
    const { request, faults } = buildQuote(deal, british);
    expect(faults).toEqual([]);
    validate(request);
    expect(validate.errors).toBeNull();
  });

  test.each(models.flatMap((model) => deals.map(([name]) => [model, name] as const)))(
    'with %s in %s is one of the contract: every kind of funding is one click away',
    (model, name) => {
      const deal = demonstration.deals[name]!;
      const switched = withValue(
        withValue(deal, 'market/funding/curve/kind', 'random'),
        'market/funding/curve/model',
        model,
      );
      const { request, faults } = buildQuote(switched, british);
      expect(faults).toEqual([]);
      validate(request);
      expect(validate.errors).toBeNull();
    },
  );

  test.each(['share', 'index', 'currency-pair', 'commodity'])(
    'of the file %s has the same numbers as the file, digit for digit, whatever the decimal sign',
    (name) => {
      const file = demonstrationFile(name);
      for (const writing of [british, german]) {
        const { request } = buildQuote(dealFrom(file, writing.sign), writing);
        const { want: _, ...rest } = request;
        same(rest, file);
      }
    },
  );

  test('what cannot be read is named at its place, and sent as it stands', () => {
    const wrong = withValue(withValue(share, 'market/spot/bid', 'about 48'), 'inquiry/quantity', '1.5m');
    const { request, faults } = buildQuote(wrong, british);
    expect(new Map(faults.map(({ at, code }) => [at, code]))).toEqual(
      new Map([
        ['/market/spot/bid', 'not-a-number'],
        ['/inquiry/quantity', 'ambiguous-m'],
      ]),
    );
    expect((request.market.spot as unknown as { bid: unknown }).bid).toBe('about 48');
  });

  test('a blank row is not sent, and the rows after it keep their own places', () => {
    const rows = share.market.income.cash;
    const blank = { id: 9, ex: '', pay: '', amount: ' ', low: '', high: '' };
    const deal = withValue(share, 'market/income/cash', [blank, rows[0], { ...rows[1], amount: 'x' }]);
    const { request, faults } = buildQuote(deal, british);
    expect(request.market.income?.cash).toHaveLength(2);
    expect(faults.map(({ at }) => at)).toEqual(['/market/income/cash/1/amount']);
  });

  test('an empty text leaves its member out', () => {
    const { request } = buildQuote(withValue(share, 'market/spot/offer', ''), british);
    expect(request.market.spot).toEqual({ bid: 48.62 });
  });
});

describe('what is kept and saved', () => {
  test('comes back the same', () => {
    const read = readState(JSON.parse(writeState(demonstration, '.')), '.');
    same(read.ok && read.value, demonstration);
  });

  test('comes back to the same numbers where the other decimal sign is written', () => {
    const read = readState(JSON.parse(writeState(demonstration, '.')), ',');
    if (!read.ok) throw new Error(read.message);
    for (const [name, deal] of deals) {
      same(buildQuote(read.value.deals[name]!, german).request, buildQuote(deal, british).request);
    }
    same(withOtherSign(read.value), demonstration);
  });

  test.each([
    ['a member that is gone', (kept: any) => delete kept.draft.deals[demonstration.current].market.spot.bid],
    ['a number where a text was', (kept: any) => (kept.draft.deals[demonstration.current].inquiry.quantity = 10000)],
    ['an unknown member', (kept: any) => (kept.draft.surprise = 1)],
    ['an unknown kind', (kept: any) => (kept.draft.deals[demonstration.current].market.asset.kind = 'bond')],
    ['a market on screen that is not there', (kept: any) => (kept.draft.current = 'elsewhere')],
    ['another format', (kept: any) => (kept.format = 'something/1')],
  ])('is refused with %s, and says so', (_, damage) => {
    const kept = JSON.parse(writeState(demonstration, '.'));
    damage(kept);
    const read = readState(kept, '.');
    expect(read.ok ? '' : read.message).toMatch(/^This file is damaged: .+\.$/);
  });

  test.each([null, 1, 'text', [], {}, { format: 'forwright-state/1' }])('is refused where it is %j', (value) => {
    expect(readState(value, '.').ok).toBe(false);
  });
});
