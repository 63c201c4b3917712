/** Collects decimal numbers and separators into one growing byte array; a few times faster than joining strings when
 *  a matrix has millions of ones. */
export class TextWriter {
  private bytes = new Uint8Array(1 << 16);
  private size = 0;

  text(ascii: string): this {
    this.reserve(ascii.length);
    for (let i = 0; i < ascii.length; i++) this.bytes[this.size++] = ascii.charCodeAt(i);
    return this;
  }

  number(value: number): this {
    this.reserve(11);
    let digits = 1;
    for (let top = 10; top <= value; top *= 10) digits++;
    let rest = value;
    for (let i = this.size + digits - 1; i >= this.size; i--) {
      const next = Math.floor(rest / 10);
      this.bytes[i] = 48 + rest - next * 10;
      rest = next;
    }
    this.size += digits;
    return this;
  }

  finish(): Uint8Array {
    return this.bytes.slice(0, this.size);
  }

  private reserve(more: number): void {
    if (this.size + more <= this.bytes.length) return;
    const larger = new Uint8Array(2 * this.bytes.length + more);
    larger.set(this.bytes);
    this.bytes = larger;
  }
}
