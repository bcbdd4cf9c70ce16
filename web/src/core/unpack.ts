/**
 * The bytes that were gzipped and written as base64. Knows nothing but what browsers have: it runs in a Worker too. The
 * short ways (`Uint8Array.from` with a function, a Blob's stream read by a Response) take several times as long, before
 * the first price.
 */
export async function unpack(packed: string): Promise<Uint8Array<ArrayBuffer>> {
  const newer = Uint8Array as unknown as { fromBase64?: (text: string) => Uint8Array<ArrayBuffer> };
  const decoded = (): Uint8Array<ArrayBuffer> => {
    const characters = atob(packed);
    const bytes = new Uint8Array(characters.length);
    for (let i = 0; i < bytes.length; ++i) bytes[i] = characters.charCodeAt(i);
    return bytes;
  };
  const unzipping = new DecompressionStream('gzip');
  const writer = unzipping.writable.getWriter();
  const written = writer.write(newer.fromBase64?.(packed) ?? decoded()).then(() => writer.close());

  const parts: Uint8Array[] = [];
  const reader = unzipping.readable.getReader();
  for (let part = await reader.read(); !part.done; part = await reader.read()) parts.push(part.value);
  await written;

  const whole = new Uint8Array(parts.reduce((length, part) => length + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
