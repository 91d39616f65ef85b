/** Numbers of path data written as bytes: two decimals at most, no trailing zeros, as `String(Math.round(x * 100) / 100)`. */
const [ZERO, MINUS, POINT] = [48, 45, 46];

export class PathBytes {
  #bytes = new Uint8Array(1 << 12);
  #length = 0;

  /** Appends one ASCII character. */
  sign(code: number): void {
    if (this.#length + 24 > this.#bytes.length) this.#grow();
    this.#bytes[this.#length++] = code;
  }

  /** Appends a number of less than 10¹² either way. */
  number(value: number): void {
    if (this.#length + 24 > this.#bytes.length) this.#grow();
    const hundredths = Math.round(value * 100);
    if (hundredths < 0) this.#bytes[this.#length++] = MINUS;
    const size = Math.abs(hundredths);
    const whole = Math.floor(size / 100);
    this.#whole(whole);
    this.#fraction(size - 100 * whole);
  }

  #whole(value: number): void {
    let digits = 1;
    for (let power = 10; power <= value; power *= 10) digits++;
    let rest = value;
    for (let at = this.#length + digits - 1; at >= this.#length; at--) {
      const tenth = Math.floor(rest / 10);
      this.#bytes[at] = ZERO + rest - 10 * tenth;
      rest = tenth;
    }
    this.#length += digits;
  }

  #fraction(hundredths: number): void {
    if (hundredths === 0) return;
    const tenths = Math.floor(hundredths / 10);
    this.#bytes[this.#length++] = POINT;
    this.#bytes[this.#length++] = ZERO + tenths;
    if (hundredths % 10 !== 0) this.#bytes[this.#length++] = ZERO + hundredths - 10 * tenths;
  }

  #grow(): void {
    const larger = new Uint8Array(2 * this.#bytes.length);
    larger.set(this.#bytes);
    this.#bytes = larger;
  }

  clear(): void {
    this.#length = 0;
  }

  text(): string {
    return Buffer.from(this.#bytes.buffer, 0, this.#length).toString('latin1');
  }
}
