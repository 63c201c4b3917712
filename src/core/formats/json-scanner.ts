import type { FormatError } from '../errors.ts';
import type { FileBytes } from './byte-source.ts';
import { TextScanner } from './text-scanner.ts';

const QUOTE = 34;
const BACKSLASH = 92;
const OPEN_LIST = 91;
const CLOSE_LIST = 93;
const OPEN_OBJECT = 123;
const CLOSE_OBJECT = 125;
const LONGEST_KEPT = 1000;
const DEEPEST = 500;

/** Reads JSON (RFC 8259) byte by byte where it lies: an object's members in turn, whole numbers and lists of them. What is
 *  not asked for is passed over, and must be JSON all the same. A key may stand once. */
export class JsonScanner {
  readonly text: TextScanner;
  /** What may stand right behind a number here. */
  private closing = CLOSE_OBJECT;

  constructor(file: FileBytes) {
    this.text = new TextScanner(file);
  }

  /** The members of the file's one object; `read` is called at each value and has to pass it.
   *  @throws FormatError with the place of what is no JSON. */
  object(read: (key: string) => void): void {
    const seen = new Set<string>();
    this.expect('{');
    if (!this.passed('}')) {
      do {
        const line = this.text.line;
        const key = this.key();
        if (seen.has(key)) throw this.text.errorAtLine(line, `"${key}" once`, 'a second one');
        seen.add(key);
        this.expect(':');
        read(key);
      } while (this.passed(','));
      this.expect('}');
    }
    if (!this.text.atEnd()) throw this.unexpected('the end of the file');
  }

  /** @throws FormatError when another value stands here. */
  wholeNumber(what: string): number {
    const first = this.next();
    if (first < 48 || first > 57) throw this.unexpected(what);
    if (first !== 48) return this.text.number(what, true, this.closing);
    // JSON has no leading zeros.
    this.text.take();
    const after = this.text.peek();
    if (isInNumber(after)) throw this.unexpected(what);
    return 0;
  }

  list(what: string, readItem: () => void): void {
    const { closing } = this;
    if (!this.passed('[')) throw this.unexpected(what);
    this.closing = CLOSE_LIST;
    if (!this.passed(']')) {
      do readItem();
      while (this.passed(','));
      this.expect(']');
    }
    this.closing = closing;
  }

  /** Passes over one value of any kind. */
  skipValue(): void {
    const open: number[] = [];
    do {
      const byte = this.next();
      if (byte === OPEN_LIST || byte === OPEN_OBJECT) {
        this.text.take();
        if (open.length === DEEPEST) throw this.text.error(`values in at most ${DEEPEST} others`, 'more');
        open.push(byte);
        if (this.isClosed(open)) open.pop();
        else {
          if (byte === OPEN_OBJECT) this.skipKey();
          continue;
        }
      } else if (byte === QUOTE) this.skipString();
      else this.skipWord();
      // Behind a value: the next one, or the end of what holds it, of which several may end here.
      while (open.length > 0 && !this.passed(',')) {
        if (!this.isClosed(open)) throw this.unexpected('a comma or the end of a list or an object');
        open.pop();
      }
      if (open.at(-1) === OPEN_OBJECT) this.skipKey();
    } while (open.length > 0);
  }

  /** An error at the present place. */
  unexpected(expected: string): FormatError {
    this.next();
    return this.text.error(expected, this.text.tokenAt());
  }

  private isClosed(open: readonly number[]): boolean {
    return this.passed(open.at(-1) === OPEN_LIST ? ']' : '}');
  }

  private next(): number {
    this.text.atEnd();
    return this.text.peek();
  }

  private passed(char: string): boolean {
    if (this.next() !== char.charCodeAt(0)) return false;
    this.text.take();
    return true;
  }

  private expect(char: string): void {
    if (!this.passed(char)) throw this.unexpected(JSON.stringify(char));
  }

  private key(): string {
    if (this.next() !== QUOTE) throw this.unexpected('a key in quotes');
    return this.skipString();
  }

  private skipKey(): void {
    this.key();
    this.expect(':');
  }

  /** Passes a string and gives it, or its beginning when it is long. */
  private skipString(): string {
    const kept: number[] = [this.text.take()];
    for (let byte = this.text.take(); byte !== QUOTE; byte = this.text.take()) {
      if (byte < 32) throw this.text.error('a string without line breaks, to its closing quote', 'none');
      if (kept.length < LONGEST_KEPT) kept.push(byte);
      if (byte !== BACKSLASH) continue;
      const escaped = this.text.take();
      if (!'"\\/bfnrtu'.includes(String.fromCharCode(escaped))) throw this.unexpected('an escape of JSON');
      if (kept.length < LONGEST_KEPT) kept.push(escaped);
      for (let left = escaped === 117 ? 4 : 0; left > 0; left--) {
        const digit = this.text.take();
        if (!/[0-9a-f]/i.test(String.fromCharCode(digit))) throw this.unexpected('four hexadecimal digits');
        if (kept.length < LONGEST_KEPT) kept.push(digit);
      }
    }
    const text = new TextDecoder().decode(Uint8Array.from(kept.slice(1)));
    return kept.length < LONGEST_KEPT ? (JSON.parse(`"${text}"`) as string) : text;
  }

  /** Passes a number, true, false or null. */
  private skipWord(): void {
    let word = '';
    const from = this.text.mark();
    for (; isInWord(this.text.peek()) && word.length < LONGEST_KEPT; this.text.take())
      word += String.fromCharCode(this.text.peek());
    if (/^(-?(0|[1-9]\d*)(\.\d+)?([eE][+-]?\d+)?|true|false|null)$/.test(word)) return;
    this.text.reset(from);
    throw this.unexpected('a value of JSON');
  }
}

const isInNumber = (byte: number) => (byte >= 48 && byte <= 57) || byte === 46 || byte === 101 || byte === 69;
const isInWord = (byte: number) => isInNumber(byte) || (byte >= 97 && byte <= 122) || byte === 43 || byte === 45;
