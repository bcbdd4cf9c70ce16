/** Labels on a line that must not lie over each other. */
export interface Label {
  /** Where its middle would like to be. */
  readonly at: number;
  readonly width: number;
}

interface Block {
  sum: number;
  count: number;
}

/**
 * The middles of `labels` (given by rising `at`), moved as little as can be, in the sense of least squares, so that
 * neighbours are `gap` apart and all lie between `low` and `high`. Where they cannot all fit they overflow at `high`.
 *
 * With each label shifted left by what stands before it, the demand is that positions do not fall; pooling adjacent
 * violators solves that exactly, and bounding the pooled values keeps it least.
 */
export function spread(labels: readonly Label[], low: number, high: number, gap: number): number[] {
  const shifts: number[] = [];
  labels.forEach(({ width }, i) => {
    const before = labels[i - 1];
    shifts.push(before ? (shifts[i - 1] ?? 0) + before.width / 2 + gap + width / 2 : 0);
  });

  const blocks: Block[] = [];
  labels.forEach(({ at }, i) => {
    blocks.push({ sum: at - (shifts[i] ?? 0), count: 1 });
    for (;;) {
      const last = blocks.at(-1);
      const before = blocks.at(-2);
      if (!last || !before || before.sum / before.count <= last.sum / last.count) break;
      blocks.splice(-2, 2, { sum: before.sum + last.sum, count: before.count + last.count });
    }
  });

  const first = labels[0];
  const final = labels.at(-1);
  if (!first || !final) return [];
  const least = low + first.width / 2;
  const most = high - final.width / 2 - (shifts.at(-1) ?? 0);
  const pooled = blocks.flatMap(({ sum, count }) => Array<number>(count).fill(sum / count));
  return pooled.map((value, i) => Math.max(least, Math.min(most, value)) + (shifts[i] ?? 0));
}
