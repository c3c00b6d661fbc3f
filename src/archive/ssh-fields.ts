/** The wire form of SSH (RFC 4251, section 5): numbers of four bytes, strings with their length before them. Never reads past the end. */
export class FieldsError extends Error {}

export class Fields {
  #at = 0;
  readonly #bytes: Uint8Array;

  constructor(bytes: Uint8Array) {
    this.#bytes = bytes;
  }

  number(): number {
    const four = this.#take(4);
    return new DataView(four.buffer, four.byteOffset, 4).getUint32(0);
  }

  string(): Uint8Array {
    return this.#take(this.number());
  }

  text(): string {
    return Buffer.from(this.string()).toString('latin1');
  }

  #take(length: number): Uint8Array {
    if (this.#at + length > this.#bytes.length) throw new FieldsError('cut off');
    this.#at += length;
    return this.#bytes.subarray(this.#at - length, this.#at);
  }
}

export const number = (value: number): Buffer => {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32BE(value);
  return bytes;
};

export function field(value: Uint8Array | string): Buffer {
  const bytes = typeof value === 'string' ? Buffer.from(value, 'latin1') : Buffer.from(value);
  return Buffer.concat([number(bytes.length), bytes]);
}
