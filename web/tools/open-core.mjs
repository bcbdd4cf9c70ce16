// Opens the packed core under Node.js, as the page does in a browser: for the demonstration of web/run and for the
// tests that compare the cores.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildSync } from 'esbuild';

/** The page's own translation into plain script (src/core/plain/script.ts). */
function plainScript(binary, script) {
  const source = fileURLToPath(new URL('../src/core/plain/script.ts', import.meta.url));
  const built = buildSync({ entryPoints: [source], bundle: true, write: false, format: 'iife', globalName: 'page' });
  return new Function(`${built.outputFiles[0].text}; return page;`)().plainScript(binary, script);
}

/**
 * @param {string} folder what pack-core.mjs wrote to
 * @param {"module" | "plain"} kind WebAssembly, or the same core as plain script
 * @returns {Promise<{answer(request: string): string, schema(): string, version(): string}>}
 */
export async function openCore(folder, kind) {
  const wasmBinary = new Uint8Array(readFileSync(join(folder, 'module.wasm')));
  const script = readFileSync(join(folder, 'module.js'), 'utf8');
  const text = kind === 'module' ? script : plainScript(wasmBinary, script);
  return new Function(`${text}; return forwrightCore;`)()({ wasmBinary });
}
