import type { FileBytes } from './byte-source.ts';
import { refuseBeyondLimits } from './matrix-limits.ts';
import { TextScanner } from './text-scanner.ts';
import { TextWriter } from './text-writer.ts';

/** The words of a constant-weight code, word i with its ones at ones[i·w .. (i+1)·w), ascending. */
export interface WordList {
  n: number;
  w: number;
  M: number;
  ones: Uint32Array;
}

/** One word a line as its rank, a colon and its positions of ones, under a line that states the sizes. Rank counts from 0 in
 *  lexicographic order of the positions, which is the order of the lines and the number that an enumerative encoder gives
 *  the word. */
export function writeWordListText(words: WordList): Uint8Array {
  const out = new TextWriter();
  out.text('# words of constant weight, one a line: rank, colon, positions of ones\n');
  writeSizes(out, words);
  ranked(words).forEach((i, rank) => {
    out.number(rank).text(':');
    for (let e = i * words.w; e < (i + 1) * words.w; e++) out.text(' ').number(words.ones[e]!);
    out.text('\n');
  });
  return out.finish();
}

/** The same as comma-separated values: rank, then one column for each one. */
export function writeWordListCsv(words: WordList): Uint8Array {
  const out = new TextWriter();
  writeSizes(out, words);
  out.text('rank');
  for (let j = 1; j <= words.w; j++) out.text(',one').number(j);
  out.text('\n');
  ranked(words).forEach((i, rank) => {
    out.number(rank);
    for (let e = i * words.w; e < (i + 1) * words.w; e++) out.text(',').number(words.ones[e]!);
    out.text('\n');
  });
  return out.finish();
}

function writeSizes(out: TextWriter, { n, w, M }: WordList): void {
  out.text('# length=').number(n).text(' weight=').number(w).text(' words=').number(M).text(' counted-from=0\n');
}

/** Places of the words in lexicographic order. */
function ranked({ w, M, ones }: WordList): number[] {
  return Array.from({ length: M }, (_, i) => i).sort((a, b) => {
    for (let j = 0; j < w; j++) {
      const difference = ones[a * w + j]! - ones[b * w + j]!;
      if (difference !== 0) return difference;
    }
    return 0;
  });
}

/** Reads either form, told by what follows the rank. Words come back in the order of their ranks, which must be 0, 1, 2, …
 *  and agree with the order of the words.
 *  @throws FormatError with line and column; LimitError on a size that passes matrixLimits. */
export function readWordList(file: FileBytes): WordList {
  const scan = new TextScanner(file);
  const { n, w, M } = readSizes(scan);
  skipColumnNames(scan);
  const ones = new Uint32Array(M * w);
  for (let i = 0; i < M; i++) {
    if (scan.atEnd()) throw scan.error(`${M} words`, `the end of the file after ${i}`);
    readWord(scan, i, n, ones.subarray(i * w, (i + 1) * w));
    if (i > 0 && !ascending(ones, i, w))
      throw scan.error('words in lexicographic order', `word ${i} before word ${i - 1}`);
    scan.nextLineIfAtEnd();
  }
  if (!scan.atEnd()) throw scan.error(`the end of the file after ${M} words`, scan.tokenAt());
  return { n, w, M, ones };
}

function readSizes(scan: TextScanner): { n: number; w: number; M: number } {
  const sizes: Record<string, number> = {};
  if (scan.atEnd()) throw scan.error('the line "# length=… weight=… words=…"', 'the end of the file');
  let line = scan.line;
  while (scan.peek() === 35) {
    line = scan.line;
    for (const [, key, digits] of scan.restOfLine().matchAll(/\b(length|weight|words|counted-from)=(\d{1,10})\b/g))
      sizes[key!] = Number(digits);
  }
  const { length: n, weight: w, words: M } = sizes;
  if (n === undefined || w === undefined || M === undefined)
    throw scan.errorAtLine(line, 'the line "# length=… weight=… words=…"', 'none');
  if (w > n) throw scan.errorAtLine(line, `a weight of ${n} or less`, String(w));
  if ((sizes['counted-from'] ?? 0) !== 0) throw scan.errorAtLine(line, 'counted-from=0', String(sizes['counted-from']));
  refuseBeyondLimits(M, n, M * w);
  return { n, w, M };
}

function skipColumnNames(scan: TextScanner): void {
  const first = scan.atEnd() ? -1 : scan.peek();
  if (first !== 114) return;
  const line = scan.line;
  const names = scan.restOfLine();
  if (!/^rank(,one\d+)*\s*$/.test(names))
    throw scan.errorAtLine(line, '"rank,one1,one2,…"', JSON.stringify(names.slice(0, 40)));
}

function readWord(scan: TextScanner, rank: number, n: number, word: Uint32Array): void {
  const given = scan.number('a rank', true, 58);
  if (given !== rank) throw scan.error(`rank ${rank}`, String(given));
  scan.skipChar(':');
  for (let j = 0; j < word.length; j++) {
    scan.skipChar(',');
    const p = scan.number(`${word.length} positions of ones`, false);
    if (p >= n || (j > 0 && p <= word[j - 1]!)) throw scan.error(`ascending positions from 0 to ${n - 1}`, String(p));
    word[j] = p;
  }
  if (!scan.atLineEnd()) throw scan.error(`the end of the line after ${word.length} ones`, scan.tokenAt());
}

function ascending(ones: Uint32Array, i: number, w: number): boolean {
  for (let j = i * w; j < (i + 1) * w; j++) if (ones[j] !== ones[j - w]) return ones[j]! > ones[j - w]!;
  return true;
}
