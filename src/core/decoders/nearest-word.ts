import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { ParamError } from '../errors.ts';

export interface NearestWord {
  /** Index of the nearest of the M words; the lowest at a tie. */
  index: number;
  distance: number;
}

/** Nearest-word decoding of a list of words of length n, such as the blocks of a design as a constant-weight code: word
 *  i is row i. Hamming distances by |w| + |y| − 2·|w ∩ y|, over the ones of y alone; maximum likelihood on a binary
 *  symmetric channel with p < 1/2.
 *  @throws ParamError on an empty list. */
export function nearestWord(words: SparseMatrix): { decode(received: Uint8Array): NearestWord } {
  if (words.rows < 1) throw new ParamError('words', words.rows, 'at least one word');
  const { start, holders } = wordsByPosition(words);
  const common = new Uint32Array(words.rows);
  return {
    decode(received) {
      common.fill(0);
      let weight = 0;
      for (let j = 0; j < words.cols; j++) {
        if (received[j] !== 1) continue;
        weight += 1;
        for (let t = start[j]!; t < start[j + 1]!; t++) common[holders[t]!]! += 1;
      }
      const nearest = { index: 0, distance: Number.POSITIVE_INFINITY };
      for (let i = 0; i < words.rows; i++) {
        const distance = words.rowStart[i + 1]! - words.rowStart[i]! + weight - 2 * common[i]!;
        if (distance < nearest.distance) Object.assign(nearest, { index: i, distance });
      }
      return nearest;
    },
  };
}

/** The words that hold each position. */
function wordsByPosition({ rows, cols, rowStart, colIndex }: SparseMatrix) {
  const start = new Uint32Array(cols + 1);
  for (const j of colIndex) start[j + 1]! += 1;
  for (let j = 0; j < cols; j++) start[j + 1]! += start[j]!;
  const next = start.slice(0, cols);
  const holders = new Uint32Array(colIndex.length);
  for (let i = 0; i < rows; i++) {
    for (let e = rowStart[i]!; e < rowStart[i + 1]!; e++) holders[next[colIndex[e]!]!++] = i;
  }
  return { start, holders };
}
