// Checks that every folder of core includes only itself and those below it.
//
//   node tests/tools/check-includes.mjs <the folder core>
import { readdirSync, readFileSync } from 'node:fs';
import { join, sep } from 'node:path';

const fromTopToBottom = [
  'program',
  'contract',
  'desk',
  'forward',
  'income',
  'discounting',
  'dates',
  'numeric',
  'outcome',
];
const height = (folder) => fromTopToBottom.length - fromTopToBottom.indexOf(folder);

const core = process.argv[2];
const faults = [];
for (const entry of readdirSync(core, { recursive: true })) {
  if (!/\.(cpp|hpp|in)$/.test(entry)) continue;
  const folder = entry.split(sep)[0];
  if (!fromTopToBottom.includes(folder)) faults.push(`${entry}: ${folder} is no folder of the core`);
  for (const [, included] of readFileSync(join(core, entry), 'utf8').matchAll(/^#include "([^/"]+)\//gm)) {
    if (!fromTopToBottom.includes(included)) faults.push(`${entry} includes ${included}/, no folder of the core`);
    else if (height(included) > height(folder)) faults.push(`${entry} includes ${included}/, which stands above it`);
  }
}
for (const fault of faults) console.error(fault);
process.exit(faults.length > 0 ? 1 : 0);
