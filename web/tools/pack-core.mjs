// Makes the core that Emscripten built ready for the page: its script shortened and without any means to reach a
// network, each part gzipped and written as base64.
//
//   node web/tools/pack-core.mjs <folder of Emscripten's build> <folder to write to>
//
// Written: module.wasm and module.js, the very files that the tests under Node.js load, and packed.json, the same two
// as the page carries them.
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import { transformSync } from 'esbuild';

/** What Emscripten's script would use to fetch its WebAssembly, were the bytes not handed in. */
const noNetwork = { fetch: 'undefined', XMLHttpRequest: 'undefined', importScripts: 'undefined' };

function shortenedScript(file) {
  const { code } = transformSync(readFileSync(file, 'utf8'), {
    minify: true,
    target: 'es2020',
    charset: 'ascii',
    define: noNetwork,
    legalComments: 'none',
  });
  return Buffer.from(code);
}

const [from, to] = process.argv.slice(2);
const parts = {
  'module.wasm': readFileSync(join(from, 'forwright-module.wasm')),
  'module.js': shortenedScript(join(from, 'forwright-module.js')),
};

mkdirSync(to, { recursive: true });
const packed = {};
for (const [name, bytes] of Object.entries(parts)) {
  writeFileSync(join(to, name), bytes);
  packed[name] = gzipSync(bytes, { level: 9 }).toString('base64');
}
writeFileSync(join(to, 'packed.json'), JSON.stringify(packed));
