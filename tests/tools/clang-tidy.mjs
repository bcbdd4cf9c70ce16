// Runs clang-tidy over the sources of a build, several at a time, and remembers what was found clean: a source is
// looked at again only when it, something of the core that it includes, its compile command or the checks changed.
//
//   node tests/tools/clang-tidy.mjs <repository> <folder with compile_commands.json> <jobs>
import { execFile, execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

const [root, build, jobs] = process.argv.slice(2);
const core = join(root, 'core');
const remembered = join(build, 'clang-tidy');
mkdirSync(remembered, { recursive: true });

const checks =
  readFileSync(join(root, '.clang-tidy'), 'utf8') + execFileSync('clang-tidy', ['--version'], { encoding: 'utf8' });

/** The text of a source and of everything of the core that it includes, each once. */
function wholeText(file, seen = new Set()) {
  if (seen.has(file) || !existsSync(file)) return '';
  seen.add(file);
  const text = readFileSync(file, 'utf8');
  const included = [...text.matchAll(/^#include "([^"]+)"/gm)].map(([, name]) => wholeText(join(core, name), seen));
  return text + included.join('');
}

/** Resolves to what clang-tidy found; empty where it found nothing. */
function examine({ file, command }) {
  const key = createHash('sha256').update(checks).update(command).update(wholeText(file)).digest('hex');
  const cleanMark = join(remembered, key);
  if (existsSync(cleanMark)) return Promise.resolve('');
  return new Promise((examined) => {
    // The compile commands are g++'s, with options that clang does not know.
    const options = ['--quiet', '-p', build, '--extra-arg=-Wno-unknown-warning-option'];
    execFile('clang-tidy', [...options, file], { maxBuffer: 1 << 26 }, (error, output, complaints) => {
      if (!error) writeFileSync(cleanMark, file);
      examined(error ? output || complaints : '');
    });
  });
}

// What is compiled a second time, under sanitizers, is the same source.
const sources = JSON.parse(readFileSync(join(build, 'compile_commands.json'), 'utf8')).filter(
  ({ file, command }) => file.startsWith(core) && !command.includes('-fsanitize'),
);
let faulty = 0;
async function work() {
  for (let source = sources.shift(); source; source = sources.shift()) {
    const found = await examine(source);
    if (found) {
      faulty += 1;
      console.error(found.trim());
    }
  }
}
await Promise.all(Array.from({ length: Number(jobs) }, work));
process.exit(faulty > 0 ? 1 : 0);
