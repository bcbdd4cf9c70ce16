import { translate } from './translate';

/**
 * The core's own script with its module put into it as plain script: it defines `forwrightCore` as before, and finds in
 * place of WebAssembly what it needs of it, its module already translated.
 */
export function plainScript(binary: Uint8Array, script: string): string {
  return `var forwrightCore=(()=>{
const translated=${translate(binary)};
const WebAssembly={RuntimeError:Error,instantiate:async(binary,imports)=>({instance:{exports:translated(binary,imports)}})};
${script}
return forwrightCore})();`;
}
