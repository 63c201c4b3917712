/** Error patterns drawn in WebAssembly, the twin of simulation/patterns.ts: xoshiro128++ (Blackman and Vigna, ACM TOMS
 *  47, 2021), the weight by a table of cumulative weights, distinct positions by Lemire's multiplication (ACM TOMACS 29,
 *  2019). Equal to the twin draw for draw, so that a frame is the same wherever it is decoded. */

import {
  base,
  block,
  branch,
  branchIf,
  type Expr,
  type FunctionBuilder,
  i32,
  i64,
  type Local,
  loop,
  type Statement,
  sequence,
  when,
  whileLoop,
} from './assembler/index.ts';
import type { LaneWord } from './lane-word.ts';
import { control, type MemoryLayout } from './memory-layout.ts';

/** The generator's state in locals, for the length of one call. */
export class DrawState {
  readonly #s: readonly [Local<'i32'>, Local<'i32'>, Local<'i32'>, Local<'i32'>];
  readonly #shifted: Local<'i32'>;
  constructor(f: FunctionBuilder) {
    this.#s = [f.local('i32'), f.local('i32'), f.local('i32'), f.local('i32')];
    this.#shifted = f.local('i32');
  }

  load(): Statement {
    return sequence(...this.#s.map((word, k) => word.set(i32.load(base, control.random + 4 * k))));
  }
  save(): Statement {
    return sequence(...this.#s.map((word, k) => i32.store(base, word, control.random + 4 * k)));
  }

  /** Puts the next word into `into`. */
  next32(into: Local<'i32'>): Statement {
    const [s0, s1, s2, s3] = this.#s;
    return sequence(
      into.set(i32.add(i32.rotl(i32.add(s0, s3), 7), s0)),
      this.#shifted.set(i32.shl(s1, 9)),
      s2.set(i32.xor(s2, s0)),
      s3.set(i32.xor(s3, s1)),
      s1.set(i32.xor(s1, s2)),
      s0.set(i32.xor(s0, s3)),
      s2.set(i32.xor(s2, this.#shifted)),
      s3.set(i32.rotl(s3, 11)),
    );
  }
}

/** Places of the weight table in memory. */
export interface WeightPlaces {
  /** Cumulative weights, 64 bits each. */
  table: number;
  /** For each top byte of a draw, the least weight it can mean: where to start looking. */
  guide: number;
}

export const reserveWeights = (layout: MemoryLayout, n: number): WeightPlaces => ({
  table: layout.reserve(8 * (n + 1)),
  guide: layout.reserve(4 * 256),
});

/** Puts the next frame's weight into `weight`: the fixed one, or the least w with u below entry w. */
export function drawWeight(
  f: FunctionBuilder,
  state: DrawState,
  places: WeightPlaces,
  weight: Local<'i32'>,
): Statement {
  const high = f.local('i32');
  const low = f.local('i32');
  const draw = f.local('i64');
  const length = i32.load(base, control.tableLength);
  return sequence(
    weight.set(i32.load(base, control.weight)),
    when(i32.ltS(weight, 0), [
      state.next32(high),
      state.next32(low),
      draw.set(i64.or(i64.shl(i64.extendU(high), 32n), i64.extendU(low))),
      weight.set(i32.load(i32.shl(i32.shrU(high, 24), 2), places.guide)),
      block((found) => [
        loop((again) => [
          branchIf(found, i32.geU(weight, length)),
          branchIf(found, i64.ltU(draw, i64.load(i32.shl(weight, 3), places.table))),
          weight.set(i32.add(weight, 1)),
          branch(again),
        ]),
      ]),
    ]),
  );
}

/** Puts a uniformly random position below n into `position`. */
function drawPosition(f: FunctionBuilder, state: DrawState, n: number, position: Local<'i32'>): () => Statement {
  const word = f.local('i32');
  const product = f.local('i64');
  const refused = 2 ** 32 % n;
  const draw = [state.next32(word), product.set(i64.mul(i64.extendU(word), BigInt(n)))];
  const whole = position.set(i32.wrap(i64.shrU(product, 32n)));
  if (refused === 0) return () => sequence(...draw, whole);
  return () =>
    sequence(
      loop((again) => [...draw, branchIf(again, i32.ltU(i32.wrap(product), refused))]),
      whole,
    );
}

export interface PositionSpace {
  n: number;
  /** Place of a table of vector offsets by position, when the kernel's order of columns is its own. */
  table: number | null;
}

/** Marks a pattern of `weight` positions in a lane that holds none: min(w, n − w) distinct positions, complemented
 *  above n/2. */
export function drawPositions(
  f: FunctionBuilder,
  state: DrawState,
  space: PositionSpace,
  word: LaneWord,
  weight: Expr<'i32'>,
): Statement {
  const { n } = space;
  const position = f.local('i32');
  const missing = f.local('i32');
  const address = f.local('i32');
  const vector = space.table === null ? i32.shl(position, 4) : i32.load(i32.shl(position, 2), space.table);
  const draw = drawPosition(f, state, n, position);
  const many = i32.gtU(weight, i32.sub(n, weight));
  return sequence(
    missing.set(weight),
    when(many, [missing.set(i32.sub(n, weight))]),
    whileLoop(missing, [
      draw(),
      address.set(word.address(vector)),
      when(i32.eqz(word.isMarked(address)), [word.toggle(address), missing.set(i32.sub(missing, 1))]),
    ]),
    when(many, [
      position.set(n),
      whileLoop(position, [
        position.set(i32.sub(position, 1)),
        address.set(word.address(vector)),
        word.toggle(address),
      ]),
    ]),
  );
}
