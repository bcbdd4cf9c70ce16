/** The bytes that were gzipped and written as base64. */
export async function unpack(packed: string): Promise<Uint8Array<ArrayBuffer>> {
  const zipped = Uint8Array.from(atob(packed), (character) => character.charCodeAt(0));
  const bytes = new Blob([zipped]).stream().pipeThrough(new DecompressionStream('gzip'));
  return new Uint8Array(await new Response(bytes).arrayBuffer());
}
