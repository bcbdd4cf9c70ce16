#!/usr/bin/env node
// Runs the native benchmarks and prints each beside the one it is compared with (`name` and `name/std`), as time a call
// and as a ratio: above 1 ours is the faster. Usage: node tests/bench/ratios.mjs build/tests/bench/forwright_bench [filter]
import { execFileSync } from 'node:child_process';

const [program, filter = '.'] = process.argv.slice(2);
if (program === undefined) {
  console.error('usage: ratios.mjs <forwright_bench> [regular expression of names]');
  process.exit(2);
}

const output = execFileSync(
  program,
  [
    `--benchmark_filter=${filter}`,
    '--benchmark_format=json',
    '--benchmark_min_time=0.1',
    '--benchmark_repetitions=5',
    '--benchmark_enable_random_interleaving=true',
    '--benchmark_report_aggregates_only=true',
  ],
  { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'], maxBuffer: 1 << 26 },
);

/** Median nanoseconds of one item (or of one round, where a benchmark counts none), by name. */
const medians = new Map();
for (const run of JSON.parse(output).benchmarks) {
  if (run.aggregate_name === 'median') {
    const perItem = run.items_per_second === undefined ? run.cpu_time : 1e9 / run.items_per_second;
    medians.set(run.run_name, perItem);
  }
}

const comparedWith = /^(.*)\/([^/]+)$/;
for (const [name, nanoseconds] of [...medians].sort()) {
  if (comparedWith.test(name)) {
    continue;
  }
  const row = [name.padEnd(24), `${nanoseconds.toFixed(2)} ns`.padStart(14)];
  for (const [other, otherNanoseconds] of medians) {
    const match = comparedWith.exec(other);
    if (match !== null && match[1] === name) {
      row.push(`${match[2]} ${otherNanoseconds.toFixed(2)} ns`.padStart(18));
      row.push(`${(otherNanoseconds / nanoseconds).toFixed(2)} x`.padStart(9));
    }
  }
  console.log(row.join(''));
}
