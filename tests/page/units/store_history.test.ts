import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { advance, back, begin, forth, type History } from '../../../web/src/store/history';
import { valueAt, withValue } from '../../../web/src/store/paths';

describe('undo and redo', () => {
  test('typing on at one place is one step', () => {
    let history = begin('');
    history = advance(history, '1', 'spot', false);
    history = advance(history, '12', 'spot', true);
    history = advance(history, '12x', 'other', true);
    history = back(history);
    expect(history.present).toBe('12');
    history = back(history);
    expect(history.present).toBe('');
    history = forth(forth(history));
    expect(history.present).toBe('12x');
  });

  test('after any edits, undoing all of them and redoing all of them passes through the same values', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.string(), fc.constantFrom('a', 'b'), fc.boolean())), (edits) => {
        let history: History<string> = begin('start');
        for (const [value, place, joined] of edits) history = advance(history, value, place, joined);
        const last = history.present;
        const seen: string[] = [];
        while (history.past.length > 0) {
          seen.push(history.present);
          history = back(history);
        }
        expect(history.present).toBe('start');
        while (history.future.length > 0) {
          history = forth(history);
          expect(history.present).toBe(seen.pop());
        }
        return history.present === last;
      }),
      { seed: 20261201 },
    );
  });
});

test('a value at a path is replaced, and what is beside it is the very same', () => {
  const tree = { rows: [{ text: 'a' }, { text: 'b' }], other: { text: 'c' } };
  const changed = withValue(tree, 'rows/1/text', 'z');
  expect(valueAt(changed, 'rows/1/text')).toBe('z');
  expect(tree.rows[1]?.text).toBe('b');
  expect(changed.other).toBe(tree.other);
  expect(changed.rows[0]).toBe(tree.rows[0]);
});
