import { describe, expect, it } from 'vitest';
import { nearest, outline, stepsByDay, tableRows, thatFit } from '../../../web/src/charts/path-geometry';
import { timeOf } from '../../../web/src/format';

const point = (date: string, fair: number) => ({ date, fair, bid: fair - 0.1, offer: fair + 0.1 });
const path = {
  points: [
    point('2026-12-01', 100),
    point('2027-03-09', 101),
    point('2027-03-10', 99.8),
    point('2027-04-01', 100),
    point('2027-04-15', 100.1),
    point('2027-05-03', 100.3),
  ],
  steps: [
    { at: '/market/income/cash/0', date: '2027-03-10', change: -1 },
    { at: '/market/income/proportional/0', date: '2027-03-10', change: -0.2 },
  ],
};

describe('the carry path', () => {
  it('falls upright on the day of a distribution, on all three lines', () => {
    const drawn = outline(path);
    expect(drawn).toHaveLength(path.points.length + 1);
    expect(drawn[2]).toEqual({ ...point('2027-03-10', 101), time: timeOf('2027-03-10') });
    expect(drawn[3]).toEqual({ ...point('2027-03-10', 99.8), time: timeOf('2027-03-10') });
  });

  it('takes distributions of one day together', () => {
    expect(stepsByDay(path)).toEqual([{ date: '2027-03-10', time: timeOf('2027-03-10'), change: -1.2 }]);
  });

  it('finds the point nearest to where one points', () => {
    expect(nearest(path.points, timeOf('2027-03-11'))).toBe(2);
    expect(nearest(path.points, timeOf('2020-01-01'))).toBe(0);
    expect(nearest(path.points, timeOf('2099-01-01'))).toBe(5);
  });

  it('tells its ends, months and steps in the table', () => {
    expect(tableRows(path).map(({ date }) => date)).toEqual([
      '2026-12-01',
      '2027-03-09',
      '2027-03-10',
      '2027-04-01',
      '2027-05-03',
    ]);
  });

  it('keeps the labels of the largest steps where not all fit', () => {
    const labels = [1, 3, 2].map((weight, i) => ({ at: i * 20, width: 30, weight }));
    expect(thatFit(labels, 5)).toEqual([labels[1]]);
    expect(thatFit(labels, -20)).toHaveLength(3);
  });
});
