import type { Enclosure, Graded } from '../../evidence.ts';
import { firstCollisionFreeSize } from './subset-collisions.ts';

interface Words {
  n: number;
  w: number;
  M: number;
  ones: Uint32Array;
}

/** Steps that pairs of words may take together: about ten seconds. */
export const DISTANCE_WORK_LIMIT = 2.5e9;

/** Steps of each way for one pair or subset, set against a word of packed bits: measured on the machine of the benches. */
const STEPS_A_MEETING = 2;
const STEPS_A_SUBSET = 6;

/** Words compared with all others where comparing each two is too much. */
const WORDS_TRIED = 20;

/** Least distance of two words, 2(w − largest number of ones that two words share).
 *
 *  Three exact ways, the cheapest first. Two words share s ones when some s-subset lies in both: sizes are tried from one
 *  up until none does, which ends at t at once for the blocks of a Steiner system S(t, w, n). Where subsets grow too many,
 *  pairs of words are counted position by position, or as packed bits, whichever is less work. Beyond the limit what the
 *  subsets told is left as a bound. */
export function leastDistance({ n, w, M, ones }: Words, limit = DISTANCE_WORK_LIMIT): Graded<Enclosure> {
  if (M < 2) return exactly(2 * w, 'fewer than two words');
  const meetings = meetingsOf({ n, w, M, ones });
  const packed = ((M * (M - 1)) / 2) * packedStride(n);
  const byPairs = Math.min(STEPS_A_MEETING * meetings, packed);
  const { size, complete, repeated } = firstCollisionFreeSize({ n, w, M, ones }, byPairs / STEPS_A_SUBSET);
  if (complete) return exactly(2 * (w - (size - 1)), `no ${size} positions are ones of two words, ${size - 1} are`);
  if (byPairs > limit) {
    const shared = Math.max(repeated, byPackedWords({ n, w, M, ones }, WORDS_TRIED));
    return {
      value: { lower: 0, upper: 2 * (w - shared) },
      grade: 'bounded',
      method: `two words share ${shared} ones; ${M} words of ${n} bits are too many to compare each two`,
    };
  }
  const largest =
    packed <= STEPS_A_MEETING * meetings ? byPackedWords({ n, w, M, ones }) : byPositions({ n, w, M, ones });
  return exactly(2 * (w - largest), 'all pairs of words compared');
}

function exactly(distance: number, method: string): Graded<Enclosure> {
  return { value: { lower: distance, upper: distance }, grade: 'computed', method };
}

/** Pairs of words on a position, over all positions. */
function meetingsOf({ n, ones }: Words): number {
  return onesByPosition(n, ones).reduce((sum, r) => sum + (r * (r - 1)) / 2, 0);
}

function onesByPosition(n: number, ones: Uint32Array): Float64Array {
  const counts = new Float64Array(n);
  for (let e = 0; e < ones.length; e++) counts[ones[e]!]!++;
  return counts;
}

/** Most ones that two words share: each word visits the earlier words on its positions. */
export function byPositions({ n, w, M, ones }: Words): number {
  const start = new Uint32Array(n + 1);
  for (const p of ones) start[p + 1]!++;
  for (let p = 0; p < n; p++) start[p + 1]! += start[p]!;
  const filled = start.slice(0, n);
  const holders = new Uint32Array(ones.length);
  const common = w < 2 ** 16 ? new Uint16Array(M) : new Uint32Array(M);
  let largest = 0;
  for (let i = 0; i < M; i++) {
    for (let e = i * w; e < (i + 1) * w; e++) {
      const p = ones[e]!;
      const end = filled[p]!;
      for (let at = start[p]!; at < end; at++) common[holders[at]!]!++;
    }
    for (let j = 0; j < i; j++) if (common[j]! > largest) largest = common[j]!;
    common.fill(0, 0, i);
    for (let e = i * w; e < (i + 1) * w; e++) holders[filled[ones[e]!]!++] = i;
  }
  return largest;
}

/** Words of 32 bits a packed word, an even number. */
const packedStride = (n: number) => 2 * ((n + 63) >>> 6);

/** Most ones that two words share, or one of the first `tried` and another: bits packed 32 a word, in tiles that stay in
 *  near memory. */
export function byPackedWords({ n, w, M, ones }: Words, tried = M): number {
  const stride = packedStride(n);
  const bits = new Int32Array(M * stride);
  for (let i = 0; i < M; i++) {
    for (let e = i * w; e < (i + 1) * w; e++) bits[i * stride + (ones[e]! >>> 5)]! |= 1 << ones[e]!;
  }
  const tile = Math.max(1, Math.floor(4096 / stride));
  let largest = 0;
  for (let from = 0; from < M; from += tile) {
    const to = Math.min(M, from + tile);
    for (let i = 0; i < Math.min(to, tried); i++) {
      for (let j = Math.max(from, i + 1); j < to; j++) {
        const common = sharedBits(bits, i * stride, j * stride, stride);
        if (common > largest) largest = common;
      }
    }
  }
  return largest;
}

/** Ones common to two packed words. Two words of bits are summed to nibbles before they are folded, which is half the work
 *  of counting each. */
function sharedBits(bits: Int32Array, a: number, b: number, stride: number): number {
  let common = 0;
  for (let k = 0; k < stride; k += 2) {
    const sum = nibbleCounts(bits[a + k]! & bits[b + k]!) + nibbleCounts(bits[a + k + 1]! & bits[b + k + 1]!);
    common += Math.imul((sum & 0x0f0f0f0f) + ((sum >>> 4) & 0x0f0f0f0f), 0x01010101) >>> 24;
  }
  return common;
}

function nibbleCounts(word: number): number {
  const pairs = word - ((word >>> 1) & 0x55555555);
  return (pairs & 0x33333333) + ((pairs >>> 2) & 0x33333333);
}
