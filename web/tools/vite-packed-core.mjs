import { readFileSync } from 'node:fs';

/**
 * The packed core as a module of the page:
 * `import { moduleWasm, moduleScript } from "virtual:packed-core"`, each gzipped and in base64.
 *
 * @param {string} packedFile packed.json as pack-core.mjs wrote it
 * @returns {import("vite").Plugin}
 */
export function packedCore(packedFile) {
  const name = 'virtual:packed-core';
  const resolved = `\0${name}`;
  return {
    name: 'packed-core',
    resolveId: (id) => (id === name ? resolved : undefined),
    load(id) {
      if (id !== resolved) return undefined;
      this.addWatchFile(packedFile);
      const packed = JSON.parse(readFileSync(packedFile, 'utf8'));
      const constant = (as, part) => `export const ${as} = ${JSON.stringify(packed[part])};\n`;
      return constant('moduleWasm', 'module.wasm') + constant('moduleScript', 'module.js');
    },
  };
}
