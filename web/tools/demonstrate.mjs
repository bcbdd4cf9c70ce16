// Prints a quote as the built module computes it.
//
//   node web/tools/demonstrate.mjs <folder of the packed core> <file with a request for a quote>
import { readFileSync } from 'node:fs';
import { openCore } from './open-core.mjs';

const [folder, file] = process.argv.slice(2);
const request = JSON.parse(readFileSync(file, 'utf8'));
const core = await openCore(folder, 'module');
const answer = JSON.parse(core.answer(JSON.stringify(request)));

if (!answer.ok) {
  for (const { at, message } of answer.errors) console.error(`${at}: ${message}`);
  process.exit(1);
}

const { asset, asOf, income } = request.market;
const { dates, fair, breakEven, quote, carry } = answer.result;
const priced = (value) => value.toFixed(4).padStart(10);
const row = (what, bid, offer) => console.log(`  ${what.padEnd(12)}${priced(bid)}${priced(offer)}`);

console.log(`${asset.name} (invented), ${asset.currency}, seen on ${asOf}`);
console.log(`forward to ${dates.maturity}, settled ${dates.settlement}, ${income.cash.length} dividends on the way`);
console.log(`  ${''.padEnd(12)}${'bid'.padStart(10)}${'offer'.padStart(10)}`);
row('quote', quote.bid, quote.offer);
row('break-even', breakEven.bid, breakEven.offer);
row('fair', fair, fair);
row('points', carry.points, carry.points);
console.log(`computed by the module, version ${core.version()}; indicative until the desk confirms it`);
