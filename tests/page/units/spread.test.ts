import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { spread } from '../../../web/src/charts/spread';

const gap = 8;
const labels = fc
  .array(fc.record({ at: fc.double({ min: 0, max: 400, noNaN: true }), width: fc.integer({ min: 10, max: 70 }) }), {
    minLength: 1,
    maxLength: 5,
  })
  .map((list) => list.sort((a, b) => a.at - b.at));

const seeded = { seed: 20261201, numRuns: 500 };

describe('labels on a line', () => {
  it('stay where they are when there is room', () => {
    expect(
      spread(
        [
          { at: 50, width: 40 },
          { at: 150, width: 40 },
        ],
        0,
        400,
        gap,
      ),
    ).toEqual([50, 150]);
  });

  it('at one place move to both sides alike', () => {
    expect(
      spread(
        [
          { at: 100, width: 40 },
          { at: 100, width: 40 },
        ],
        0,
        400,
        gap,
      ),
    ).toEqual([76, 124]);
  });

  it('none of none', () => {
    expect(spread([], 0, 100, gap)).toEqual([]);
  });

  it('never lie over each other and stay inside', () => {
    fc.assert(
      fc.property(labels, (list) => {
        const places = spread(list, 0, 500, gap);
        list.forEach(({ width }, i) => {
          const place = places[i] ?? NaN;
          expect(place - width / 2).toBeGreaterThanOrEqual(-1e-9);
          expect(place + width / 2).toBeLessThanOrEqual(500 + 1e-9);
          const before = list[i - 1];
          if (before)
            expect(place - (places[i - 1] ?? 0)).toBeGreaterThanOrEqual((before.width + width) / 2 + gap - 1e-9);
        });
      }),
      seeded,
    );
  });

  // The problem is convex: where no shift of a run of neighbours lowers the sum of squares, none does.
  it('move as little as can be', () => {
    const cost = (list: readonly { at: number }[], places: readonly number[]): number =>
      list.reduce((sum, { at }, i) => sum + ((places[i] ?? 0) - at) ** 2, 0);
    fc.assert(
      fc.property(labels, fc.nat(4), fc.nat(4), fc.constantFrom(-0.5, 0.5), (list, from, to, by) => {
        const places = spread(list, 0, 500, gap);
        const moved = places.map((place, i) => (i >= from && i <= to ? place + by : place));
        const allowed = list.every(({ width }, i) => {
          const place = moved[i] ?? 0;
          const before = list[i - 1];
          const apart = !before || place - (moved[i - 1] ?? 0) >= (before.width + width) / 2 + gap;
          return apart && place >= width / 2 && place <= 500 - width / 2;
        });
        if (allowed) expect(cost(list, moved)).toBeGreaterThanOrEqual(cost(list, places) - 1e-6);
      }),
      seeded,
    );
  });
});
