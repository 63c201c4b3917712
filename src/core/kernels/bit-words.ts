/** The words of 128 frames, a bit each, and the passes over them that the hard-decision kernels share. */

import {
  base,
  type FunctionBuilder,
  type FunctionRef,
  i32,
  type ModuleBuilder,
  memoryCopy,
  type Statement,
  sequence,
  type V128,
  v128,
} from './assembler/index.ts';
import { eachVector } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { type Place, type SideTables, walk } from './graph-walk.ts';
import { control, vectorBytes } from './memory-layout.ts';
import { at, parityInto, put } from './votes.ts';

const nothing = { params: [], results: [] } as const;
export const mask = (place: number) => v128.load(base, place);

/** Vectors of an array: kept twice over for a circulant, so that a cyclic shift is an offset. */
export const arrayBytes = (plan: GraphPlan, count: number): number => vectorBytes * count * (plan.circulant ? 2 : 1);

/** Zeros in the lanes that hold no frame. */
export function emitClear(m: ModuleBuilder, n: number, word: number): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const active = f.local('v128');
    f.emit(
      active.set(mask(control.active)),
      eachVector(i, n, [v128.store(i, v128.and(v128.load(i, word), active), word)]),
    );
  });
}

/** An array that takes the drawn words of fresh lanes; kept twice over, in a circulant, where `twice`. */
export interface TakingArray {
  array: number;
  twice: boolean;
}

/** Spreads what was drawn into the word: the second copy of a circulant, and the arrays that begin as the word. */
export function emitFilled(
  m: ModuleBuilder,
  plan: GraphPlan,
  word: number,
  takers: readonly TakingArray[],
): FunctionRef {
  const bytes = vectorBytes * plan.H.cols;
  const double = (array: number) => memoryCopy(i32.of(array + bytes), i32.of(array), i32.of(bytes));
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const fresh = f.local('v128');
    if (plan.circulant) f.emit(double(word));
    f.emit(fresh.set(mask(control.fresh)));
    for (const { array, twice } of takers) {
      const taken = v128.bitselect(v128.load(i, word), v128.load(i, array), fresh);
      f.emit(eachVector(i, plan.H.cols, [v128.store(i, taken, array)]));
      if (plan.circulant && twice) f.emit(double(array));
    }
  });
}

/** Syndromes of all frames, and which fail, and which are not all zero. */
export function emitSyndrome(
  m: ModuleBuilder,
  plan: GraphPlan,
  rows: SideTables,
  { word, syndrome }: { word: number; syndrome: number },
): FunctionRef {
  return m.func(nothing, (f) => {
    const sum = f.local('v128');
    const failing = f.local('v128');
    f.emit(
      walk(f, rows, (row) => [
        ...parityInto(row, sum, (bit) => at(bit, word)),
        putTwice(plan, row.own, syndrome, plan.H.rows, sum),
        failing.set(v128.or(failing, sum)),
      ]),
      v128.store(base, failing, control.failing),
    );
    f.emit(noteWrong(f, plan.H.cols, word));
  });
}

/** Sets `wrong`: the lanes with a one anywhere in the word. */
export function noteWrong(f: FunctionBuilder, n: number, word: number): Statement {
  const i = f.local('i32');
  const wrong = f.local('v128');
  return sequence(
    eachVector(i, n, [wrong.set(v128.or(wrong, v128.load(i, word)))]),
    v128.store(base, wrong, control.wrong),
  );
}

/** Stores a vector, in both copies of an array that is kept twice over. */
export function putTwice(plan: GraphPlan, place: Place, array: number, count: number, value: V128): Statement {
  const once = put(place, array, value);
  return plan.circulant ? sequence(once, put(place, array + vectorBytes * count, value)) : once;
}
