/** The core as Emscripten made it, its module and its script, each gzipped and in base64 (tools/vite-packed-core.mjs). */
declare module 'virtual:packed-core' {
  export const moduleWasm: string;
  export const moduleScript: string;
}
