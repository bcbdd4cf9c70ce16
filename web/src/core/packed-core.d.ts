/** The cores, each gzipped and in base64 (tools/vite-packed-core.mjs). */
declare module 'virtual:packed-core' {
  export const moduleWasm: string;
  export const moduleScript: string;
  export const plainScript: string;
}
