import {
  base,
  type FunctionBuilder,
  i32,
  i32x4,
  type Local,
  type Statement,
  v128,
  whileLoop,
} from './assembler/index.ts';
import type { ConductorPlaces } from './conductor.ts';
import { control, type MemoryLayout } from './memory-layout.ts';
import { digitsFor } from './votes.ts';

/** Thresholds that change from iteration to iteration. Frames of different ages share a word, so that each lane has its
 *  own: the cohorts say which lanes are in which iteration. */
export interface Schedule {
  /** Emits code that sets a threshold for every lane, and gives the planes that hold it. */
  emitPlanes(
    f: FunctionBuilder,
    largest: number,
    places: ConductorPlaces,
    active: Local<'v128'>,
  ): { code: Statement[]; planes: Local<'v128'>[] };
  write(memory: ArrayBuffer): void;
}

export function reserveSchedule(layout: MemoryLayout, given: readonly number[], cap: number): Schedule {
  const thresholds = given.slice(0, cap);
  const table = layout.reserve(4 * thresholds.length);
  return {
    write: (memory) => new Uint32Array(memory, table, thresholds.length).set(thresholds),
    emitPlanes(f, largest, places, active) {
      const planes = Array.from({ length: digitsFor(largest + 1) }, () => f.local('v128'));
      const entry = f.local('i32');
      const slot = f.local('i32');
      const lanes = f.local('v128');
      const rest = f.local('v128');
      const last = 4 * (thresholds.length - 1);
      const addThreshold = planes.map((plane, k) => {
        const digit = i32.and(i32.shrU(i32.load(entry, table), k), 1);
        return plane.set(v128.or(plane, v128.and(lanes, i32x4.splat(i32.sub(0, digit)))));
      });
      const code = [
        ...planes.map((plane) => plane.set(v128.zero)),
        rest.set(active),
        entry.set(0),
        slot.set(i32.load(base, control.slot)),
        whileLoop(i32.ltU(entry, last), [
          lanes.set(v128.and(v128.load(i32.shl(slot, 4), places.ring), rest)),
          rest.set(v128.andnot(rest, lanes)),
          ...addThreshold,
          entry.set(i32.add(entry, 4)),
          slot.set(previousSlot(slot, cap)),
        ]),
        // Frames older than the list go on with its last entry.
        lanes.set(rest),
        ...addThreshold,
      ];
      return { code, planes };
    },
  };
}

const previousSlot = (slot: Local<'i32'>, cap: number) => i32.sub(i32.add(slot, i32.mul(i32.eqz(slot), cap + 2)), 1);
