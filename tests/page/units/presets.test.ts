import { describe, expect, test } from 'vitest';
import { emptyDeal } from '../../../web/src/model/draft';
import { buildQuote } from '../../../web/src/model/build';
import { editedSince } from '../../../web/src/presets/apply';
import { presets } from '../../../web/src/presets/presets';
import { valueAt, withValue } from '../../../web/src/store/paths';

describe('what is usual in a market', () => {
  test.each(presets.map((preset) => [preset.name, preset] as const))('%s fills fields that are there', (_, preset) => {
    for (const { path, value } of preset.usual) {
      expect(valueAt(emptyDeal, path), path).toBeDefined();
      expect(typeof value === typeof valueAt(emptyDeal, path), path).toBe(true);
    }
    expect(preset.sources.length).toBeGreaterThan(0);
    const filled = preset.usual.reduce((deal, { path, value }) => withValue(deal, path, value), emptyDeal);
    expect(editedSince(filled, preset)).toEqual([]);
    expect(buildQuote(filled, { sign: '.', locale: 'en-GB' }).faults).toEqual([]);
    const [first] = preset.usual;
    if (first !== undefined) expect(editedSince(withValue(filled, first.path, 'XYZ'), preset)).toEqual([first.what]);
  });

  test('the dollar’s calendar counts no settlement days of a pair against it', () => {
    const lagCalendars = (id: string): unknown =>
      presets.find((preset) => preset.id === id)?.usual.find(({ path }) => path === 'market/asset/lagCalendars')?.value;
    expect(lagCalendars('pair-eur-usd')).toBe('EUTA');
    expect(lagCalendars('pair-usd-jpy')).toBe('JPTO');
    expect(lagCalendars('pair-eur-gbp')).toBe('');
  });
});
