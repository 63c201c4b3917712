/** Bit flipping, majority logic and Gallager A and B where the engine has no WebAssembly SIMD: 32 frames a word of plain
 *  TypeScript, with lanes filled again as frames end. Same tally as the reference, some tens of times faster. */

import { createPatternSource, type PatternSource } from '../simulation/patterns.ts';
import type { RunSpec } from '../simulation/run-spec.ts';
import { emptyTally, type Tally } from '../simulation/tally.ts';
import type { FastShardOptions } from './fast-shard.ts';
import { type SlicedRule, slicedRule } from './sliced-rules.ts';

const lanes = 32;

/** The shard in bit slices of 32; null where this path has no decoder for it. */
export function slicedShard(spec: RunSpec, index: number, options: FastShardOptions = {}): Promise<Tally> | null {
  const kinds: ReadonlySet<string> = new Set(['bsc', 'awgn-hard', 'stratum', 'gilbert-elliott']);
  if (!kinds.has(spec.channel.kind)) return null;
  const rule = slicedRule(spec.H, spec.decoder);
  return rule && decode(spec, index, rule, options);
}

/** Edges of 32 frames walked between two pauses: about 10 ms. */
const edgesPerPause = 2_000_000;

async function decode(spec: RunSpec, index: number, rule: SlicedRule, options: FastShardOptions): Promise<Tally> {
  const shard = new SlicedShard(spec, rule, await createPatternSource(spec, index));
  const steps = Math.max(1, Math.floor(edgesPerPause / spec.H.colIndex.length));
  options.signal?.throwIfAborted();
  for (let step = 1; !shard.step(); step++) {
    if (step % steps !== 0) continue;
    if (options.pause) await options.pause();
    options.signal?.throwIfAborted();
  }
  return shard.tally;
}

class SlicedShard {
  readonly tally = emptyTally();
  readonly #rule: SlicedRule;
  readonly #source: PatternSource;
  readonly #positions: Uint32Array;
  readonly #ages = new Uint32Array(lanes);
  readonly #n: number;
  #left: number;
  #active = 0;
  #stuck = 0;

  constructor({ H, framesPerShard }: RunSpec, rule: SlicedRule, source: PatternSource) {
    this.#rule = rule;
    this.#source = source;
    this.#n = H.cols;
    this.#positions = new Uint32Array(H.cols);
    this.#left = framesPerShard;
  }

  /** Fills, tests, counts, iterates; true when every frame is counted. */
  step(): boolean {
    this.#fill();
    const failing = this.#rule.failing();
    for (let lane = 0; lane < lanes; lane++) {
      const bit = 1 << lane;
      if (!(this.#active & bit)) continue;
      const fails = (failing & bit) !== 0;
      const stuck = (this.#stuck & bit) !== 0;
      if (fails && !stuck && this.#ages[lane] !== this.#rule.cap) continue;
      // An iteration that flipped nothing is not counted.
      this.#count(lane, this.#ages[lane]! - (stuck ? 1 : 0), fails);
      this.#active &= ~bit;
    }
    this.#stuck = 0;
    if (this.#active === 0) return this.#left === 0;
    this.#stuck = this.#rule.iterate(this.#active);
    for (let lane = 0; lane < lanes; lane++) this.#ages[lane]!++;
    return false;
  }

  #fill(): void {
    const free = ~this.#active;
    if (free === 0 || this.#left === 0) return;
    const word = this.#rule.word;
    for (let j = 0; j < word.length; j++) word[j]! &= this.#active;
    let fresh = 0;
    for (let lane = 0; lane < lanes && this.#left > 0; lane++) {
      const bit = 1 << lane;
      if (!(free & bit)) continue;
      const weight = this.#source.next(this.#positions);
      for (let i = 0; i < weight; i++) word[this.#positions[i]!]! |= bit;
      this.#left -= 1;
      this.#ages[lane] = 0;
      fresh |= bit;
    }
    this.#active |= fresh;
    this.#rule.begin(fresh);
  }

  #count(lane: number, iterations: number, fails: boolean): void {
    const { tally } = this;
    const { word } = this.#rule;
    let wrong = 0;
    for (let j = 0; j < word.length; j++) wrong += (word[j]! >>> lane) & 1;
    tally.frames += 1;
    tally.bits += this.#n;
    tally.iterations += iterations;
    while (tally.iterationHistogram.length <= iterations) tally.iterationHistogram.push(0);
    tally.iterationHistogram[iterations]!++;
    if (wrong === 0) return;
    tally.frameErrors += 1;
    tally.bitErrors += wrong;
    tally.bitErrorsSquared += wrong ** 2;
    if (!fails) tally.undetected += 1;
  }
}
