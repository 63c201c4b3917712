import { FormatError } from '../errors.ts';
import { decodeText } from './decode-text.ts';

export interface KeyedLines {
  /** What stands after `key=`, trimmed. @throws FormatError when the key is missing. */
  value(key: string): { text: string; line: number };
  /** The same as a whole number. @throws FormatError when it is none or too small. */
  number(key: string, least: number): number;
  /** Lines that are neither comments nor `key=…`, with their numbers. */
  rest: { text: string; line: number }[];
}

/** Splits a small text file into its `key=value` lines and the others; `#` begins a comment line. Takes CR, LF and CRLF,
 *  a byte order mark and a missing last newline. */
export function linesOf(bytes: Uint8Array): KeyedLines {
  const values = new Map<string, { text: string; line: number }>();
  const rest: KeyedLines['rest'] = [];
  const lines = decodeText(bytes).split(/\r\n|\n|\r/);
  lines.forEach((raw, i) => {
    const text = raw.trim();
    if (text === '' || text.startsWith('#')) return;
    const pair = /^([a-z-]+)=(.*)$/.exec(text);
    if (!pair) rest.push({ text, line: i + 1 });
    else if (values.has(pair[1]!)) throw new FormatError(i + 1, 1, `"${pair[1]}=" once`, 'a second one');
    else values.set(pair[1]!, { text: pair[2]!.trim(), line: i + 1 });
  });
  const value = (key: string) => {
    const found = values.get(key);
    if (!found) throw new FormatError(lines.length, 1, `a line "${key}=…"`, 'none');
    return found;
  };
  return {
    value,
    number(key, least) {
      const { text, line } = value(key);
      if (!/^\d{1,9}$/.test(text) || Number(text) < least)
        throw new FormatError(line, key.length + 2, `a whole number from ${least}`, JSON.stringify(text.slice(0, 20)));
      return Number(text);
    },
    rest,
  };
}
