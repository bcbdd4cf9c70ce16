// Opens the packed cores under Node.js, as the page does in a browser: for the demonstration of web/run and for
// the tests that compare the cores.
import { readFileSync } from 'node:fs';
import { join } from 'node:path';

/**
 * @param {string} folder what pack-core.mjs wrote to
 * @param {"module" | "plain"} kind WebAssembly, or the same core as plain script
 * @returns {Promise<{answer(request: string): string, schema(): string, version(): string}>}
 */
export async function openCore(folder, kind) {
  const script = readFileSync(join(folder, `${kind}.js`), 'utf8');
  const open = new Function(`${script}; return forwrightCore;`)();
  const handedIn = kind === 'module' ? { wasmBinary: readFileSync(join(folder, 'module.wasm')) } : {};
  return open(handedIn);
}
