import Ajv from 'ajv/dist/2020';
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { buildQuote, fundingChoices } from '../../../web/src/model/build';
import { emptyCurve, models } from '../../../web/src/model/draft';
import { dealFrom } from '../../../web/src/model/from-request';
import { withOtherSign } from '../../../web/src/model/number-texts';
import type { Curve, QuoteRequest } from '../../../web/src/model/request';
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

describe('a random curve within a scenario', () => {
  const model = { kind: 'random', model: 'vasicek', r0: 0.02, meanReversion: 0.1, longRun: 0.03, volatility: 0.012 };
  const fitted = { kind: 'random', model: 'hull-white', meanReversion: 0.2, volatility: 0.01, fit: 0.025 };
  const nested = {
    kind: 'random',
    model: 'scenarios',
    scenarios: [
      { weight: 0.6, curve: model },
      {
        weight: 0.4,
        curve: { kind: 'random', model: 'scenarios', scenarios: [{ weight: 1, curve: fitted }] },
      },
    ],
  } as unknown as Curve;

  test('is brought to texts and back, within a scenario of a scenario too', () => {
    const file = demonstrationFile('share');
    const request = { ...file, market: { ...file.market, funding: { curve: nested } } };
    const { request: made, faults } = buildQuote(dealFrom(request, '.'), british);
    expect(faults).toEqual([]);
    validate(made);
    expect(validate.errors).toBeNull();
    const curve = made.market.funding.curve as unknown as { scenarios: { curve: object }[] };
    expect(curve.scenarios[0]?.curve).toEqual(model);
    const inner = curve.scenarios[1]?.curve as { scenarios: { weight: number; curve: object }[] };
    expect(inner.scenarios[0]?.weight).toBe(1);
    expect(inner.scenarios[0]?.curve).toMatchObject({ ...fitted, fit: { rate: 0.025 } });
  });

  test('is added to scenarios that an earlier version kept with a flat rate or points alone', () => {
    const kept = JSON.parse(writeState(demonstration, '.'));
    const row = kept.draft.deals[demonstration.current].market.funding.curve.scenarios.rows[0];
    const { kind, flat, pillars } = row.curve;
    row.curve = { kind, flat, pillars };
    const read = readState(kept, '.');
    if (!read.ok) throw new Error(read.message);
    const brought = read.value.deals[demonstration.current]!.market.funding.curve.scenarios.rows[0]!.curve;
    expect(brought).toEqual({ ...emptyCurve, kind, flat, pillars });
  });

  test('is refused where it is damaged deep inside', () => {
    const kept = JSON.parse(writeState(demonstration, '.'));
    const row = kept.draft.deals[demonstration.current].market.funding.curve.scenarios.rows[0];
    row.curve.scenarios.rows = [{ id: 1, weight: '1', curve: { ...emptyCurve, kind: 'round' } }];
    const read = readState(kept, '.');
    expect(read.ok ? '' : read.message).toContain('/scenarios/rows/0/curve/scenarios/rows/0/curve/kind');
  });
});

describe('fundings to compare', () => {
  test('are all that are typed in, the one on screen first, then those put by', () => {
    const other = withValue(share.market.funding.curve, 'vasicek/volatility', '3');
    const kept = [{ id: 4, name: 'Vasicek, wilder', curve: { ...other, kind: 'random', model: 'vasicek' } as const }];
    const choices = fundingChoices(share, kept, british);
    expect(choices[0]?.key).toBe(share.market.funding.curve.kind);
    expect(choices.map(({ key }) => key)).toEqual(expect.arrayContaining(['flat', 'pillars', ...models]));
    expect(choices.at(-1)).toMatchObject({ key: 'kept 4', name: 'Vasicek, wilder', curve: { volatility: 0.03 } });
    expect(new Set(choices.map(({ key }) => key)).size).toBe(choices.length);
  });

  test('leave out what nothing is typed in', () => {
    const bare = withValue(share, 'market/funding/curve', emptyCurve);
    expect(fundingChoices(bare, [], british).map(({ key }) => key)).toEqual(['flat']);
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
