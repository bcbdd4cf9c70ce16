import { resolve } from 'node:path';
import { defineConfig } from 'vite';
import { packedCore } from './tools/vite-packed-core.mjs';
import { singleFile } from './tools/vite-single-file.mjs';

/** Where the cores were packed and the single file goes; web/run sets it. */
const build = resolve(process.env.FORWRIGHT_BUILD ?? '../build');

export default defineConfig({
  plugins: [packedCore(resolve(build, 'packed/packed.json')), singleFile('forwright.html')],
  build: {
    outDir: resolve(build, 'page'),
    emptyOutDir: true,
    target: 'es2022',
    modulePreload: false,
    cssCodeSplit: false,
    assetsInlineLimit: Number.MAX_SAFE_INTEGER,
    chunkSizeWarningLimit: Number.MAX_SAFE_INTEGER,
    reportCompressedSize: false,
    rollupOptions: { output: { inlineDynamicImports: true } },
  },
});
