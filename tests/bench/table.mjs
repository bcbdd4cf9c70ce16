// Prints what was measured beside its mark: ratios within this run (higher is better), or milliseconds (lower is).
//
//   node tests/bench/table.mjs <native.json> <module.jsonl> <page.json>
import { readFileSync } from 'node:fs';

const [nativeFile, moduleFile, pageFile] = process.argv.slice(2);

/** Median nanoseconds of one item (or of one round, where a benchmark counts none), by name. */
const native = new Map(
  JSON.parse(readFileSync(nativeFile, 'utf8'))
    .benchmarks.filter((run) => run.aggregate_name === 'median')
    .map((run) => [run.run_name, run.items_per_second === undefined ? run.cpu_time : 1e9 / run.items_per_second]),
);
const module = new Map(
  readFileSync(moduleFile, 'utf8')
    .trim()
    .split('\n')
    .map((line) => JSON.parse(line))
    .map(({ name, nanoseconds }) => [name, nanoseconds]),
);
const page = JSON.parse(readFileSync(pageFile, 'utf8'));

const against = (times, name, others = times) => others.get(`${name}/std`) / times.get(name);
const rows = [
  ['path kernel, native against plain', against(native, 'path kernel'), 3, 4.3],
  ['path kernel, module against native plain', against(module, 'path kernel', native), 2.3, 3.4],
  ['antithetic pairs, a value, native', against(native, 'path kernel, antithetic'), 5, 7],
  ['antithetic pairs, a value, module', against(module, 'path kernel, antithetic', native), 3.8, 4.8],
  ['path kernel, module / native', module.get('path kernel') / native.get('path kernel'), 2.2, 1.5],
  ['100,000 forwards, native against plain', against(native, 'batch of forwards'), 6, 9.5],
  ['100,000 forwards, module against its plain', against(module, 'batch of forwards'), 9, 15],
  ['exp against the library, native', against(native, 'exp')],
  ['log against the library, native', against(native, 'log')],
  ['whole quote, native, ms', native.get('whole quote') / 1e6],
  ['whole quote, module, ms', page['whole quote, module'], 1, 0.25],
  ['whole quote, plain script, ms', page['whole quote, plain script']],
  ['cold start to the first price, ms', page['cold start to the first price, median'], 250, 100],
  ['input to changed price, p95, ms', page['input to changed price, p95'], 16, 4],
];

console.log(`${'what'.padEnd(46)}${'measured'.padStart(10)}${'mark'.padStart(8)}${'aim'.padStart(8)}`);
for (const [what, measured, mark, aim] of rows) {
  const reaches = (goal) => (mark < aim ? measured >= goal : measured <= goal);
  const verdict =
    mark === undefined ? '' : reaches(aim) ? '  aim reached' : reaches(mark) ? '  mark reached' : '  short of the mark';
  const cell = (value) => (value === undefined ? '' : String(value)).padStart(8);
  console.log(`${what.padEnd(46)}${measured?.toFixed(2).padStart(10)}${cell(mark)}${cell(aim)}${verdict}`);
}
