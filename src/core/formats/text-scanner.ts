import { FormatError } from '../errors.ts';

/** Reads whitespace-separated whole numbers out of bytes, line by line, and knows where it is. Accepts CR, LF and
 *  CRLF, a UTF-8 byte order mark, and a missing last newline. Lines and columns count from 1. */
export class TextScanner {
  private at: number;
  private lineStart: number;
  line = 1;

  constructor(private readonly bytes: Uint8Array) {
    const hasMark = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf;
    this.at = hasMark ? 3 : 0;
    this.lineStart = this.at;
  }

  get column(): number {
    return this.at - this.lineStart + 1;
  }

  /** True when nothing but white space is left in the file. */
  atEnd(): boolean {
    this.skipBlank(true);
    return this.at >= this.bytes.length;
  }

  /** True when nothing but blanks is left on this line. */
  atLineEnd(): boolean {
    this.skipBlank(false);
    return this.at >= this.bytes.length || isLineBreak(this.bytes[this.at]!);
  }

  /** Past the break, when nothing but blanks is left on this line. */
  nextLineIfAtEnd(): void {
    if (this.atLineEnd()) this.skipLineBreak();
  }

  /** The rest of this line as text, without its break. */
  restOfLine(): string {
    const from = this.at;
    while (this.at < this.bytes.length && !isLineBreak(this.bytes[this.at]!)) this.at++;
    const text = new TextDecoder().decode(this.bytes.subarray(from, this.at));
    this.skipLineBreak();
    return text;
  }

  peek(): number {
    return this.bytes[this.at] ?? -1;
  }

  /** Skips one byte if it is `char`, with blanks around it. */
  skipChar(char: string): boolean {
    this.skipBlank(false);
    if (this.bytes[this.at] !== char.charCodeAt(0)) return false;
    this.at++;
    this.skipBlank(false);
    return true;
  }

  /** The next whole number, at most 2^32 − 1. `acrossLines` lets it stand on a later line; `endedBy` is a further byte
   *  that may follow it.
   *  @throws FormatError saying what was expected and what stands there. */
  number(expected: string, acrossLines = true, endedBy = -1): number {
    this.skipBlank(acrossLines);
    let value = 0;
    const from = this.at;
    for (; this.at < this.bytes.length; this.at++) {
      const digit = this.bytes[this.at]! - 48;
      if (digit < 0 || digit > 9) break;
      value = value * 10 + digit;
      if (value > 0xffffffff) throw this.error(expected, 'a number over 4294967295', from);
    }
    if (this.at === from || !(this.atTokenEnd() || this.bytes[this.at] === endedBy))
      throw this.error(expected, this.tokenAt(from), from);
    return value;
  }

  error(expected: string, found: string, at = this.at): FormatError {
    return new FormatError(this.line, at - this.lineStart + 1, expected, found);
  }

  /** An error about a whole line that has been read already. */
  errorAtLine(line: number, expected: string, found: string): FormatError {
    return new FormatError(line, 1, expected, found);
  }

  /** What stands at the present place, for messages. */
  tokenAt(from = this.at): string {
    if (from >= this.bytes.length) return 'the end of the file';
    if (isLineBreak(this.bytes[from]!)) return 'the end of the line';
    let to = from;
    while (to < this.bytes.length && to - from < 20 && this.bytes[to]! > 32) to++;
    const printable = Array.from(this.bytes.subarray(from, Math.max(to, from + 1)), (b) =>
      b >= 32 && b < 127 ? String.fromCharCode(b) : `\\x${b.toString(16).padStart(2, '0')}`,
    );
    return JSON.stringify(printable.join(''));
  }

  private atTokenEnd(): boolean {
    const b = this.bytes[this.at];
    return b === undefined || b === 32 || b === 9 || b === 44 || isLineBreak(b);
  }

  private skipBlank(acrossLines: boolean): void {
    for (;;) {
      const b = this.bytes[this.at];
      if (b === 32 || b === 9) this.at++;
      else if (acrossLines && b !== undefined && isLineBreak(b)) this.skipLineBreak();
      else return;
    }
  }

  private skipLineBreak(): void {
    if (this.at >= this.bytes.length) return;
    if (this.bytes[this.at] === 13 && this.bytes[this.at + 1] === 10) this.at++;
    this.at++;
    this.line++;
    this.lineStart = this.at;
  }
}

const isLineBreak = (byte: number) => byte === 10 || byte === 13;
