// Prints "<passed> <failed>" as a run of tests reported it.
//
//   node tests/tools/count.mjs doctest <the output of its parts> <how many parts> <cases in all> | vitest <its JSON report>
import { readFileSync } from 'node:fs';

const [kind, file, parts, cases] = process.argv.slice(2);
const report = readFileSync(file, 'utf8');

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
  // Every part counts the tests of the others as passed. One that broke off has no summary and counts as failed.
  const summaries = [...report.matchAll(/test cases:\s*\d+ \|\s*\d+ passed \|\s*(\d+) failed/g)];
  const failed = summaries.reduce((sum, [, count]) => sum + Number(count), Number(parts) - summaries.length);
  return [Number(cases) - failed, failed];
}

console.log(counted().join(' '));
