import { hardCrossover } from '../channels/awgn.ts';
import { createBurstPatterns } from '../channels/gilbert-elliott.ts';
import { LimitError, ParamError } from '../errors.ts';
import { longestWord, positionBelow, type Random, randomOf } from './random.ts';
import type { RunSpec } from './run-spec.ts';
import { bscWeightTable, weightOf } from './weight-table.ts';

/** The frames' patterns of one shard, in frame order: what is flipped, or erased, or (on the Z channel) flipped where a
 *  one was sent. A pattern depends on (seed, index, frame, n, channel) and on nothing else. */
export interface PatternSource {
  /** Writes the positions of the next frame's pattern, distinct and in no stated order, and returns how many. */
  next(into: Uint32Array): number;
}

/** The patterns of shard `index`.
 *  @throws ParamError on the AWGN channel, whose noise is not a pattern; LimitError above 2^21 bits. */
export async function createPatternSource(
  spec: Pick<RunSpec, 'H' | 'channel' | 'seed' | 'rate'>,
  index: number,
): Promise<PatternSource> {
  const n = spec.H.cols;
  if (n > longestWord) throw new LimitError('H', n, longestWord, 'columns');
  return patternsFrom(spec, await randomOf(spec.seed, index));
}

/** The same from a generator in any state. */
export function patternsFrom(spec: Pick<RunSpec, 'H' | 'channel' | 'rate'>, random: Random): PatternSource {
  const n = spec.H.cols;
  const { channel } = spec;
  switch (channel.kind) {
    case 'bsc':
    case 'z':
      return independentErrors(n, channel.p, random);
    case 'bec':
      return independentErrors(n, channel.e, random);
    case 'awgn-hard':
      return independentErrors(n, hardCrossover(channel.ebn0Db, spec.rate), random);
    case 'stratum':
      if (channel.weight > n) throw new ParamError('channel.weight', channel.weight, `a weight from 0 to ${n}`);
      return { next: patternDrawer(n, random, () => channel.weight) };
    case 'gilbert-elliott':
      return createBurstPatterns(n, channel, random);
    case 'awgn':
      throw new ParamError('channel.kind', channel.kind, 'a channel whose noise is a pattern of positions');
  }
}

function independentErrors(n: number, p: number, random: Random): PatternSource {
  const table = bscWeightTable(n, p);
  return {
    next: patternDrawer(n, random, () => {
      const hi = random.next32();
      const lo = random.next32();
      return weightOf(table, hi, lo);
    }),
  };
}

/** Draws a weight w, then min(w, n − w) distinct positions: a position drawn before is drawn again. Above n/2 the
 *  pattern is the complement of what was drawn. Given the weight, every pattern is equally likely. */
function patternDrawer(n: number, random: Random, weight: () => number): PatternSource['next'] {
  const drawn = new Uint8Array(n);
  const positions = new Uint32Array(n);
  return (into) => {
    const w = weight();
    const few = Math.min(w, n - w);
    for (let count = 0; count < few; ) {
      const position = positionBelow(n, random);
      if (drawn[position]) continue;
      drawn[position] = 1;
      positions[count++] = position;
    }
    if (w <= n - w) into.set(positions.subarray(0, few));
    else for (let j = 0, at = 0; j < n; j++) if (!drawn[j]) into[at++] = j;
    for (let i = 0; i < few; i++) drawn[positions[i]!] = 0;
    return w;
  };
}
