/** Reads a WebAssembly binary from its beginning, as its specification (version 1, section 5) lays it out. */
export class BinaryReader {
  private readonly view: DataView;

  constructor(
    private readonly bytes: Uint8Array,
    public at = 0,
  ) {
    this.view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  get atEnd(): boolean {
    return this.at >= this.bytes.length;
  }

  byte(): number {
    return this.view.getUint8(this.at++);
  }

  /** An unsigned number of up to 32 bits in LEB128. */
  unsigned(): number {
    let value = 0;
    for (let factor = 1; ; factor *= 128) {
      const byte = this.byte();
      value += (byte & 127) * factor;
      if (byte < 128) return value;
    }
  }

  /** A signed number of up to 32 bits in LEB128. */
  signed(): number {
    let value = 0;
    for (let width = 0; ;) {
      const byte = this.byte();
      value |= (byte & 127) << width;
      width += 7;
      if (byte < 128) return width < 32 && byte & 64 ? value | (-1 << width) : value;
    }
  }

  /** A signed number of up to 64 bits in LEB128. */
  signedLong(): bigint {
    let value = 0n;
    let width = 0;
    for (;;) {
      const byte = this.byte();
      value |= BigInt(byte & 127) << BigInt(width);
      width += 7;
      if (byte < 128) return BigInt.asIntN(Math.min(width, 64), value);
    }
  }

  float(): number {
    this.at += 4;
    return this.view.getFloat32(this.at - 4, true);
  }

  double(): number {
    this.at += 8;
    return this.view.getFloat64(this.at - 8, true);
  }

  /** The sixteen bytes of a vector, as four whole numbers of 32 bits. */
  vector(): number[] {
    this.at += 16;
    return [16, 12, 8, 4].map((back) => this.view.getInt32(this.at - back, true));
  }

  name(): string {
    const length = this.unsigned();
    this.at += length;
    return new TextDecoder().decode(this.bytes.subarray(this.at - length, this.at));
  }

  /** A count, then that many of what `read` reads. */
  list<Item>(read: () => Item): Item[] {
    return Array.from({ length: this.unsigned() }, read);
  }
}
