// Prints how large the single file is, part by part, gzipped as a mail or a web server would, against the budget.
//
//   node web/tools/report-size.mjs <folder of the packed core> <the single file>
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';

const budgetKilobytes = 350;

const [packedFolder, file] = process.argv.slice(2);
const whole = readFileSync(file);
const packed = JSON.parse(readFileSync(join(packedFolder, 'packed.json'), 'utf8'));

const kilobytes = (bytes) => bytes / 1024;
const row = (what, size) => console.log(`  ${what.padEnd(34)}${kilobytes(size).toFixed(1).padStart(7)} KB`);

const zipped = Object.fromEntries(
  Object.entries(packed).map(([name, text]) => [name, Buffer.from(text, 'base64').length]),
);
const total = gzipSync(whole, { level: 9 }).length;
const cores = Object.values(zipped).reduce((sum, size) => sum + size, 0);

console.log('Size, gzipped:');
row('module, WebAssembly', zipped['module.wasm']);
row('module, its script', zipped['module.js']);
row('page and packing', total - cores);
row(`all (budget ${budgetKilobytes} KB)`, total);
row('on disk, as it is', whole.length);
console.log(`SHA-256 ${createHash('sha256').update(whole).digest('hex')}  ${file}`);
if (kilobytes(total) > budgetKilobytes) {
  console.error(`The file is larger than its budget of ${budgetKilobytes} KB gzipped.`);
  process.exit(1);
}
