// Prints "<passed> <failed>" as a run of tests reported it.
//
//   node tests/tools/count.mjs doctest <its output> | vitest <its JSON report>
import { readFileSync } from 'node:fs';

const [kind, file] = process.argv.slice(2);
// Under Node.js doctest colours what it prints.
const report = readFileSync(file, 'utf8').replace(/\u001b\[[0-9;]*m/g, '');

function counted() {
  if (kind === 'vitest') {
    const { numPassedTests, numFailedTests, testResults } = JSON.parse(report);
    // A file that breaks before its first test has failed without a failed test.
    const broken = testResults.filter(
      ({ status, assertionResults }) =>
        status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
    ).length;
    return [numPassedTests, numFailedTests + broken];
  }
  const summary = /test cases:\s*\d+ \|\s*(\d+) passed \|\s*(\d+) failed/.exec(report);
  if (!summary) throw new Error(`${file} has no summary of doctest's.`);
  return summary.slice(1);
}

console.log(counted().join(' '));
