/** The words of 128 frames, a bit each, and the passes over them that the hard-decision kernels share. */

import { base, type FunctionRef, i32, type ModuleBuilder, memoryCopy, v128 } from './assembler/index.ts';
import { eachVector } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { type SideTables, walk } from './graph-walk.ts';
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

/** Spreads what was drawn into the word: the second copy of a circulant, and the received word where it is kept. */
export function emitFilled(m: ModuleBuilder, plan: GraphPlan, word: number, received: number | null): FunctionRef {
  const bytes = vectorBytes * plan.H.cols;
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const fresh = f.local('v128');
    if (plan.circulant) f.emit(memoryCopy(i32.of(word + bytes), i32.of(word), i32.of(bytes)));
    if (received === null) return;
    const taken = v128.bitselect(v128.load(i, word), v128.load(i, received), fresh);
    f.emit(fresh.set(mask(control.fresh)), eachVector(i, plan.H.cols, [v128.store(i, taken, received)]));
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
    const i = f.local('i32');
    const wrong = f.local('v128');
    f.emit(
      eachVector(i, plan.H.cols, [wrong.set(v128.or(wrong, v128.load(i, word)))]),
      v128.store(base, wrong, control.wrong),
    );
  });
}

/** Stores a vector, in both copies of an array that is kept twice over. */
export function putTwice(
  plan: GraphPlan,
  place: Parameters<typeof put>[0],
  array: number,
  count: number,
  value: Parameters<typeof put>[2],
) {
  const once = put(place, array, value);
  return plan.circulant ? both(once, put(place, array + vectorBytes * count, value)) : once;
}

const both = (a: ReturnType<typeof put>, b: ReturnType<typeof put>): ReturnType<typeof put> => ({
  type: 'void',
  code: [a.code, b.code],
});
