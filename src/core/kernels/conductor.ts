/** The loop around every kernel: lanes are filled with frames in frame order, the words' syndromes tested, frames that
 *  ended are counted and their lanes filled again, and an iteration done on the rest, until the shard is drained. A
 *  shard is a fixed set of frames, all finished; stopping in mid-flight would favour the quick ones.
 *
 *  How long a frame has been under way is kept by cohorts: a ring of lane masks, one for each iteration in which frames
 *  began, moved on by one slot an iteration. */

import {
  base,
  block,
  branch,
  branchIf,
  countLoop,
  type Expr,
  type FunctionBuilder,
  type FunctionRef,
  i32,
  i64,
  i64x2,
  type Local,
  loop,
  type ModuleBuilder,
  type Statement,
  v128,
  when,
  whileLoop,
} from './assembler/index.ts';
import type { LaneWordOf } from './lane-word.ts';
import { control, type MemoryLayout, vectorBytes } from './memory-layout.ts';
import {
  DrawState,
  drawPositions,
  drawWeight,
  type PositionSpace,
  reserveWeights,
  type WeightPlaces,
} from './pattern-drawing.ts';

const nothing = { params: [], results: [] } as const;

/** What a kernel brings. All functions take their masks from the control block. */
export interface LaneKernel {
  lanes: 128 | 16 | 2;
  /** Filling lanes a second time in a step costs another syndrome pass; it is done when so many are free. */
  refillAt: number;
  cap: number;
  positions: PositionSpace;
  word: LaneWordOf;
  /** Takes the lanes that are not active back to a frame without errors. */
  clear: FunctionRef;
  /** Called after patterns were drawn into the fresh lanes. */
  filled: FunctionRef;
  /** Sets `failing` and `wrong`. */
  syndrome: FunctionRef;
  /** One iteration on the active lanes; may set `stuck`. */
  iterate: FunctionRef;
  /** Called before `weigh` when some frame ended wrong. */
  beforeWeighing: FunctionRef | null;
  /** Wrong bits of a lane, from its number. */
  weigh: FunctionRef;
}

export interface ConductorPlaces {
  weights: WeightPlaces;
  /** Frames by iterations done, 32 bits each. */
  histogram: number;
  ring: number;
}

export const reserveConductor = (layout: MemoryLayout, n: number, cap: number): ConductorPlaces => ({
  weights: reserveWeights(layout, n),
  histogram: layout.reserve(4 * (cap + 2)),
  ring: layout.reserve(vectorBytes * ringSlots(cap)),
});

/** A frame is at most cap + 1 iterations old when it is counted. */
const ringSlots = (cap: number) => cap + 2;

/** Frames without errors that one call of `refill` may count before it lets the caller go on. */
const mostSkipped = 100_000;

/** Emits `run(steps)`, which gives 1 when the shard is drained, and `refill`, exported for tests. */
export function emitConductor(m: ModuleBuilder, places: ConductorPlaces, kernel: LaneKernel): void {
  const refill = emitRefill(m, places, kernel);
  const settle = emitSettle(m, places, kernel);
  const step = emitStep(m, kernel, refill, settle);
  m.func(
    { params: ['i32'], results: ['i32'] },
    (f) => {
      const steps = f.param(0, 'i32');
      f.emit(
        block((drained) => [
          whileLoop(steps, [
            steps.set(i32.sub(steps, 1)),
            step.call(),
            branchIf(drained, i32.eqz(i32.or(i32.load(base, control.left), v128.anyTrue(mask(control.active))))),
          ]),
        ]),
        i32.eqz(i32.or(i32.load(base, control.left), v128.anyTrue(mask(control.active)))),
      );
    },
    'run',
  );
}

const mask = (place: number) => v128.load(base, place);

/** How many frames a mask names. */
const population = (m: Local<'v128'>): Expr<'i32'> =>
  i32.wrap(i64.add(i64.popcnt(i64x2.extract(m, 0)), i64.popcnt(i64x2.extract(m, 1))));

/** Draws frames into the free lanes while frames are left. A frame without errors is counted on the spot: every decoder
 *  here leaves it alone after 0 iterations. */
function emitRefill(m: ModuleBuilder, places: ConductorPlaces, kernel: LaneKernel): FunctionRef {
  return m.func(
    nothing,
    (f) => {
      const left = f.local('i32');
      const free = f.local('i64');
      const lane = f.local('i32');
      const weight = f.local('i32');
      const skipped = f.local('i32');
      const slot = f.local('i32');
      const state = new DrawState(f);
      const word = kernel.word(f);
      const weighed = drawWeight(f, state, places.weights, weight);
      const positions = drawPositions(f, state, kernel.positions, word, weight);
      const occupy = (address: Expr<'i32'>, place: number) =>
        i64.store(address, i64.or(i64.load(address, place), i64.and(free, i64.sub(0n, free))), place);
      const fillHalf = (half: 0 | 1): Statement[] => [
        free.set(i64.and(i64.xor(i64.load(base, control.active + 8 * half), -1n), laneBits(kernel.lanes, half))),
        block((full) => [
          loop((again) => [
            branchIf(full, i64.eqz(free)),
            branchIf(full, i32.eqz(left)),
            left.set(i32.sub(left, 1)),
            weighed,
            when(
              weight,
              [
                lane.set(i32.add(i32.wrap(i64.ctz(free)), 64 * half)),
                word.prepare(lane),
                positions,
                occupy(base, control.active + 8 * half),
                occupy(base, control.fresh + 8 * half),
                occupy(slot, places.ring + 8 * half),
                free.set(i64.and(free, i64.sub(free, 1n))),
              ],
              [skipped.set(i32.add(skipped, 1)), branchIf(full, i32.geU(skipped, mostSkipped))],
            ),
            branch(again),
          ]),
        ]),
      ];
      f.emit(
        left.set(i32.load(base, control.left)),
        when(left, [
          kernel.clear.call(),
          slot.set(i32.shl(i32.load(base, control.slot), 4)),
          state.load(),
          ...fillHalf(0),
          ...(kernel.lanes === 128 ? fillHalf(1) : []),
          state.save(),
          i32.store(base, left, control.left),
          i32.store(base, i32.add(i32.load(base, places.histogram), skipped), places.histogram),
          kernel.filled.call(),
        ]),
      );
    },
    'refill',
  );
}

function laneBits(lanes: number, half: 0 | 1): bigint {
  if (lanes === 128) return -1n;
  return half === 0 ? (1n << BigInt(lanes)) - 1n : 0n;
}

/** Counts the frames that ended: those whose word satisfies all checks, those at the cap, those that are stuck. */
function emitSettle(m: ModuleBuilder, places: ConductorPlaces, kernel: LaneKernel): FunctionRef {
  const record = emitRecord(m, places, kernel);
  const judge = emitJudge(m, kernel);
  return m.func(nothing, (f) => {
    const active = f.local('v128');
    const failing = f.local('v128');
    const stuck = f.local('v128');
    const ended = f.local('v128');
    const oldest = f.local('i32');
    f.emit(
      active.set(mask(control.active)),
      failing.set(v128.and(mask(control.failing), active)),
      stuck.set(v128.and(mask(control.stuck), failing)),
      // The cohort of age `cap`.
      oldest.set(i32.sub(i32.load(base, control.slot), kernel.cap)),
      when(i32.ltS(oldest, 0), [oldest.set(i32.add(oldest, ringSlots(kernel.cap)))]),
      ended.set(v128.or(v128.load(i32.shl(oldest, 4), places.ring), stuck)),
      ended.set(v128.or(v128.andnot(active, failing), v128.and(failing, ended))),
      v128.store(base, v128.zero, control.stuck),
      when(v128.anyTrue(ended), [
        v128.store(base, v128.andnot(active, ended), control.active),
        when(v128.anyTrue(v128.and(ended, mask(control.wrong))), [
          judge.call(v128.and(ended, mask(control.wrong)), failing),
        ]),
        when(v128.anyTrue(stuck), [record.call(stuck, 1)]),
        record.call(v128.andnot(ended, stuck), 0),
      ]),
    );
  });
}

/** Adds the frames of a mask to the histogram, each under its age less `uncounted`, and takes them out of the ring. */
function emitRecord(m: ModuleBuilder, places: ConductorPlaces, { cap }: LaneKernel): FunctionRef {
  return m.func({ params: ['v128', 'i32'], results: [] }, (f) => {
    const rest = f.param(0, 'v128');
    const uncounted = f.param(1, 'i32');
    const slot = f.local('i32');
    const entry = f.local('i32');
    const found = f.local('v128');
    const cohort = f.local('i32');
    f.emit(
      slot.set(i32.load(base, control.slot)),
      entry.set(i32.sub(0, i32.shl(uncounted, 2))),
      whileLoop(v128.anyTrue(rest), [
        cohort.set(i32.shl(slot, 4)),
        found.set(v128.and(v128.load(cohort, places.ring), rest)),
        when(v128.anyTrue(found), [
          v128.store(cohort, v128.andnot(v128.load(cohort, places.ring), found), places.ring),
          i32.store(entry, i32.add(i32.load(entry, places.histogram), population(found)), places.histogram),
          rest.set(v128.andnot(rest, found)),
        ]),
        entry.set(i32.add(entry, 4)),
        when(i32.eqz(slot), [slot.set(ringSlots(cap))]),
        slot.set(i32.sub(slot, 1)),
      ]),
    );
  });
}

/** Counts wrong frames and their wrong bits; undetected are those that fail no check. */
function emitJudge(m: ModuleBuilder, kernel: LaneKernel): FunctionRef {
  return m.func({ params: ['v128', 'v128'], results: [] }, (f) => {
    const wrong = f.param(0, 'v128');
    const failing = f.param(1, 'v128');
    const undetected = f.local('v128');
    const rest = f.local('i64');
    const bits = f.local('i64');
    const weighHalf = (half: 0 | 1): Statement[] => [
      rest.set(i64x2.extract(wrong, half)),
      block((none) => [
        loop((again) => [
          branchIf(none, i64.eqz(rest)),
          bits.set(i64.extendU(kernel.weigh.value('i32', i32.add(i32.wrap(i64.ctz(rest)), 64 * half)))),
          add(control.bitErrors, bits),
          add(control.bitErrorsSquared, i64.mul(bits, bits)),
          rest.set(i64.and(rest, i64.sub(rest, 1n))),
          branch(again),
        ]),
      ]),
    ];
    f.emit(
      add(control.frameErrors, i64.extendU(population(wrong))),
      undetected.set(v128.andnot(wrong, failing)),
      add(control.undetected, i64.extendU(population(undetected))),
      ...(kernel.beforeWeighing ? [kernel.beforeWeighing.call()] : []),
      ...weighHalf(0),
      ...(kernel.lanes === 128 ? weighHalf(1) : []),
    );
  });
}

const add = (counter: number, value: Expr<'i64'>): Statement =>
  i64.store(base, i64.add(i64.load(base, counter), value), counter);

/** One step: fill, test, count; fill and test again where it pays; iterate. */
function emitStep(m: ModuleBuilder, kernel: LaneKernel, refill: FunctionRef, settle: FunctionRef): FunctionRef {
  return m.func(nothing, (f) => {
    const active = f.local('v128');
    const free = (): Expr<'i32'> => i32.sub(kernel.lanes, population(active));
    f.emit(
      active.set(mask(control.active)),
      when(free(), [refill.call()]),
      kernel.syndrome.call(),
      settle.call(),
      active.set(mask(control.active)),
      when(i32.load(base, control.left), [
        when(i32.geS(free(), kernel.refillAt), [refill.call(), kernel.syndrome.call(), settle.call()]),
      ]),
      when(v128.anyTrue(mask(control.active)), [
        kernel.iterate.call(),
        v128.store(base, v128.zero, control.fresh),
        ...advance(f, kernel.cap),
      ]),
    );
  });
}

function advance(f: FunctionBuilder, cap: number): Statement[] {
  const slot = f.local('i32');
  return [
    slot.set(i32.add(i32.load(base, control.slot), 1)),
    when(i32.eq(slot, ringSlots(cap)), [slot.set(0)]),
    i32.store(base, slot, control.slot),
  ];
}

/** An n-vector pass: runs the body for the byte offset of each vector. */
export const eachVector = (at: Local<'i32'>, n: number, body: Statement[]): Statement =>
  countLoop(at, { from: 0, to: vectorBytes * n, step: vectorBytes }, body);
