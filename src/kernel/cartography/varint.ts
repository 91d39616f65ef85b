import { KernelError } from '../errors';

/** Base-128 varints and zig-zag signs of Protocol Buffers, for integers up to ±2³⁰. */
export class ByteWriter {
  private buffer = new Uint8Array(1024);
  private length = 0;

  byte(value: number): void {
    if (this.length === this.buffer.length) {
      const grown = new Uint8Array(2 * this.length);
      grown.set(this.buffer);
      this.buffer = grown;
    }
    this.buffer[this.length++] = value;
  }

  varint(value: number): void {
    let rest = value;
    while (rest > 0x7f) {
      this.byte((rest & 0x7f) | 0x80);
      rest >>>= 7;
    }
    this.byte(rest);
  }

  zigzag(value: number): void {
    this.varint(value < 0 ? -2 * value - 1 : 2 * value);
  }

  bytes(): Uint8Array {
    return this.buffer.slice(0, this.length);
  }
}

const broken = (offset: number) =>
  new KernelError('OutOfRange', {
    quantity: 'offset',
    value: offset,
    problem: 'the bytes end or break off here',
  });

/** Reads what {@link ByteWriter} wrote. @throws {KernelError} `OutOfRange` where the bytes break off. */
export class ByteReader {
  private offset = 0;

  constructor(private readonly buffer: Uint8Array) {}

  byte(): number {
    const value = this.buffer[this.offset];
    if (value === undefined) throw broken(this.offset);
    this.offset++;
    return value;
  }

  varint(): number {
    let value = 0;
    for (let shift = 0; shift <= 28; shift += 7) {
      const byte = this.byte();
      value |= (byte & 0x7f) << shift;
      if (byte < 0x80) return value >>> 0;
    }
    throw broken(this.offset);
  }

  zigzag(): number {
    const value = this.varint();
    return value & 1 ? -(value >>> 1) - 1 : value >>> 1;
  }

  /** A number of things of a byte at least, so that broken bytes never ask for more memory than they could fill. */
  count(): number {
    return this.withinRest(this.varint());
  }

  withinRest(count: number): number {
    if (count > this.buffer.length - this.offset) throw broken(this.offset);
    return count;
  }

  /** `n` lengths as running sums. */
  ends(n: number): Uint32Array {
    const ends = new Uint32Array(this.withinRest(n));
    let sum = 0;
    for (let i = 0; i < n; i++) ends[i] = sum += this.varint();
    return ends;
  }
}
