import { FormatError } from '../errors.ts';
import { bytesFrom, type FileBytes } from './byte-source.ts';

/** Bytes held at once of a file that is read where it lies, and those kept of what went before, for messages. */
const WINDOW = 1 << 20;
const KEPT = 1 << 12;
/** Characters of a line of text that are looked at. */
const LONGEST_TEXT = 1 << 16;

/** A place in a file to come back to. */
export interface ScanMark {
  readonly position: number;
  readonly line: number;
  readonly lineStart: number;
}

/** Reads whitespace-separated whole numbers out of a file, line by line, and knows where it is. Accepts CR, LF and
 *  CRLF, a UTF-8 byte order mark, and a missing last newline. Lines and columns count from 1. */
export class TextScanner {
  /** The part of the file in hand, and where in the file it begins. */
  private bytes: Uint8Array;
  private base = 0;
  private buffer: Uint8Array | undefined;
  /** Place in `bytes`. */
  private at: number;
  /** Place in the file. */
  private lineStart: number;
  line = 1;

  constructor(private readonly file: FileBytes) {
    this.bytes = file instanceof Uint8Array ? file : bytesFrom(file, 0, WINDOW);
    const [a, b, c] = this.bytes;
    this.at = a === 0xef && b === 0xbb && c === 0xbf ? 3 : 0;
    this.lineStart = this.at;
  }

  /** True when nothing but white space is left in the file. */
  atEnd(): boolean {
    this.skipBlank(true);
    return !this.hasByte();
  }

  /** True when nothing but blanks is left on this line. */
  atLineEnd(): boolean {
    this.skipBlank(false);
    return !this.hasByte() || isLineBreak(this.bytes[this.at]!);
  }

  /** Past the break, when nothing but blanks is left on this line. */
  nextLineIfAtEnd(): void {
    if (this.atLineEnd()) this.skipLineBreak();
  }

  mark(): ScanMark {
    return { position: this.base + this.at, line: this.line, lineStart: this.lineStart };
  }

  /** Goes back (or on) to a marked place. */
  reset({ position, line, lineStart }: ScanMark): void {
    if (!(this.file instanceof Uint8Array)) {
      this.bytes = this.bytes.subarray(0, 0);
      this.base = position;
    }
    this.at = position - this.base;
    this.line = line;
    this.lineStart = lineStart;
  }

  /** The rest of this line as text, without its break; no more of it than anyone would read.
   *  @throws FormatError at a NUL byte, which no text holds. */
  restOfLine(): string {
    const found: number[] = [];
    for (; this.hasByte() && !isLineBreak(this.bytes[this.at]!); this.at++) {
      if (this.bytes[this.at] === 0) throw this.nulByte();
      if (found.length < LONGEST_TEXT) found.push(this.bytes[this.at]!);
    }
    this.skipLineBreak();
    return new TextDecoder().decode(Uint8Array.from(found));
  }

  peek(): number {
    return this.hasByte() ? this.bytes[this.at]! : -1;
  }

  /** The next byte, and past it; −1 at the end.
   *  @throws FormatError at a NUL byte, which no text holds. */
  take(): number {
    const byte = this.peek();
    if (byte === 0) throw this.nulByte();
    if (isLineBreak(byte)) this.skipLineBreak();
    else if (byte !== -1) this.at++;
    return byte;
  }

  /** Skips one byte if it is `char`, with blanks around it. */
  skipChar(char: string): boolean {
    this.skipBlank(false);
    if (this.peek() !== char.charCodeAt(0)) return false;
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
    const from = this.base + this.at;
    for (; this.hasByte(); this.at++) {
      const digit = this.bytes[this.at]! - 48;
      if (digit < 0 || digit > 9) break;
      value = value * 10 + digit;
      if (value > 0xffffffff) throw this.errorAt(from, expected, 'a number over 4294967295');
    }
    if (this.base + this.at === from || !(this.atTokenEnd() || this.peek() === endedBy))
      throw this.errorAt(from, expected, this.tokenFrom(from));
    return value;
  }

  error(expected: string, found: string): FormatError {
    return this.errorAt(this.base + this.at, expected, found);
  }

  /** An error about a whole line that has been read already. */
  errorAtLine(line: number, expected: string, found: string): FormatError {
    return new FormatError(line, 1, expected, found);
  }

  /** What stands at the present place, for messages. */
  tokenAt(): string {
    return this.tokenFrom(this.base + this.at);
  }

  private nulByte(): FormatError {
    return this.errorAt(this.base + this.at, 'text', 'a NUL byte');
  }

  private errorAt(position: number, expected: string, found: string): FormatError {
    return new FormatError(this.line, position - this.lineStart + 1, expected, found);
  }

  private tokenFrom(position: number): string {
    if (!this.hasByte() && position === this.base + this.at) return 'the end of the file';
    const from = Math.max(0, position - this.base);
    if (isLineBreak(this.bytes[from]!)) return 'the end of the line';
    let to = from;
    while (to < this.bytes.length && to - from < 20 && this.bytes[to]! > 32) to++;
    const printable = Array.from(this.bytes.subarray(from, Math.max(to, from + 1)), (b) =>
      b >= 32 && b < 127 ? String.fromCharCode(b) : `\\x${b.toString(16).padStart(2, '0')}`,
    );
    return JSON.stringify(printable.join(''));
  }

  private atTokenEnd(): boolean {
    if (!this.hasByte()) return true;
    const b = this.bytes[this.at]!;
    return b === 32 || b === 9 || b === 44 || isLineBreak(b);
  }

  private skipBlank(acrossLines: boolean): void {
    while (this.hasByte()) {
      const b = this.bytes[this.at]!;
      if (b === 32 || b === 9) this.at++;
      else if (acrossLines && isLineBreak(b)) this.skipLineBreak();
      else return;
    }
  }

  private skipLineBreak(): void {
    if (!this.hasByte()) return;
    const wasReturn = this.bytes[this.at] === 13;
    this.at++;
    if (wasReturn && this.peek() === 10) this.at++;
    this.line++;
    this.lineStart = this.base + this.at;
  }

  /** Whether a byte stands at `at`; moves the window on when it is past its end. */
  private hasByte(): boolean {
    return this.at < this.bytes.length || this.moveOn();
  }

  private moveOn(): boolean {
    if (this.file instanceof Uint8Array) return false;
    const next = this.base + this.bytes.length;
    const kept = this.bytes.subarray(Math.max(0, this.bytes.length - KEPT));
    // One buffer for the whole file: memory that is let go of a megabyte at a time piles up before it is reclaimed.
    this.buffer ??= new Uint8Array(KEPT + WINDOW);
    this.buffer.set(kept);
    const got = this.file.read(next, this.buffer.subarray(kept.length));
    this.bytes = this.buffer.subarray(0, kept.length + got);
    this.base = next - kept.length;
    this.at = kept.length;
    return got > 0;
  }
}

const isLineBreak = (byte: number) => byte === 10 || byte === 13;
