/** Decoders that flip where most checks fail: all such bits (bit flipping by the maximum), or the first of them
 *  (gradient descent with single flips, Wadayama and others, IEEE Trans. Commun. 58, 2010). 128 frames a word, in two
 *  passes: each bit's count as planes and the largest of each lane, then the bits that reach it. */

import { abovePlanes, addPlanes } from './adder-network.ts';
import {
  countLoop,
  type FunctionBuilder,
  type FunctionRef,
  i32,
  type Local,
  ModuleBuilder,
  type Statement,
  type V128,
  v128,
} from './assembler/index.ts';
import { arrayBytes, emitClear, emitFilled, emitSyndrome, mask, putTwice } from './bit-words.ts';
import { emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { columnTables, rowTables, type SideTables, type Site, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { bitLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import type { PositionSpace } from './pattern-drawing.ts';
import { at, countNeighbours, digitsFor, splatPlanes } from './votes.ts';
import { emitWeighing } from './weighing.ts';

export interface LargestRule {
  cap: number;
  /** Gradient descent: a bit that differs from the received one counts as one more failing check, and one bit is
   *  flipped, of lowest index at a tie. */
  single: boolean;
}

interface Arrays {
  word: number;
  syndrome: number;
  received: number | null;
  /** `digits` vectors a bit. */
  counts: number;
  digits: number;
}

const refillAt = 40;

/** @param plan Its one setting, for `single`, is the largest column weight less the bit's own: with it the bit of least
 *  Δ_j = 1 + d_j − 2v_j is the one of largest 2v_j + setting. */
export function largestCountKernel(plan: GraphPlan, rule: LargestRule): KernelImage {
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, rule.cap);
  const digits = digitsFor(rule.single ? 3 * plan.largestColumn + 2 : plan.largestColumn);
  const arrays: Arrays = {
    word: layout.reserve(arrayBytes(plan, H.cols)),
    syndrome: layout.reserve(arrayBytes(plan, H.rows)),
    received: rule.single ? layout.reserve(vectorBytes * H.cols) : null,
    counts: layout.reserve(vectorBytes * digits * H.cols),
    digits,
  };
  const rows = rowTables(plan, layout);
  const columns = columnTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const takers = arrays.received === null ? [] : [{ array: arrays.received, twice: false }];
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes: 128,
    refillAt,
    cap: rule.cap,
    positions: positions.space,
    word: bitLanes(arrays.word),
    clear: emitClear(m, H.cols, arrays.word),
    filled: emitFilled(m, plan, arrays.word, takers),
    syndrome: emitSyndrome(m, plan, rows, arrays),
    iterate: emitIterate(m, plan, columns, positions.space, arrays, rule.single),
    ...emitWeighing(m, layout, H.cols, arrays.word),
  });
  const stepNs = H.colIndex.length + 2 * digits * H.cols;
  return finishKernel(m, layout, {
    n: H.cols,
    cap: rule.cap,
    places,
    word: arrays.word,
    stepNs,
    tables: [rows, columns, positions],
  });
}

function emitIterate(
  m: ModuleBuilder,
  plan: GraphPlan,
  columns: SideTables,
  space: PositionSpace,
  arrays: Arrays,
  single: boolean,
): FunctionRef {
  return m.func({ params: [], results: [] }, (f) => {
    const largest = Array.from({ length: arrays.digits }, () => f.local('v128'));
    const counts = f.local('i32');
    f.emit(
      walk(f, columns, (bit) => {
        const { code, planes } = countsOf(f, plan, bit, arrays, single);
        f.giveBack(...planes);
        const above = f.borrow('v128');
        f.giveBack(above);
        const read = (k: number): V128 => v128.load(counts, arrays.counts + vectorBytes * k);
        return [
          ...code,
          counts.set(i32.mul(bit.own.address, arrays.digits)),
          ...largest.map((_, k) => v128.store(counts, planes[k] ?? v128.zero, arrays.counts + vectorBytes * k)),
          above.set(
            abovePlanes(
              largest.map((_, k) => read(k)),
              largest,
            ),
          ),
          ...largest.map((digit, k) => digit.set(v128.bitselect(read(k), digit, above))),
        ];
      }),
      ...flipLargest(f, plan, space, arrays, { largest, counts, single }),
    );
  });
}

/** The bit's count as planes: failing checks, or 2v + setting. */
function countsOf(f: FunctionBuilder, plan: GraphPlan, bit: Site, arrays: Arrays, single: boolean) {
  const differs =
    arrays.received === null ? undefined : v128.xor(at(bit.own, arrays.word), at(bit.own, arrays.received));
  const votes = countNeighbours(f, bit, (check) => at(check, arrays.syndrome), {
    extra: differs,
    largest: plan.largestColumn + 1,
  });
  if (!single) return votes;
  const setting = bit.setting(0);
  const addend = splatPlanes(i32.of(setting), arrays.digits);
  const sum = Array.from({ length: arrays.digits }, () => f.borrow('v128'));
  const code = [
    ...votes.code,
    ...sum.map((digit, k) => digit.set(addend[k]!)),
    ...addPlanes(f, sum, [v128.zero, ...votes.planes]),
  ];
  f.giveBack(...votes.planes);
  return { code, planes: sum };
}

/** Flips in the active lanes the bits whose count is the largest: all, or the first in the matrix's order. */
function flipLargest(
  f: FunctionBuilder,
  plan: GraphPlan,
  space: PositionSpace,
  arrays: Arrays,
  { largest, counts, single }: { largest: readonly Local<'v128'>[]; counts: Local<'i32'>; single: boolean },
): Statement[] {
  const j = f.local('i32');
  const vector = f.local('i32');
  const waiting = f.local('v128');
  const flips = f.local('v128');
  const place = space.table === null ? i32.shl(j, 4) : i32.load(i32.shl(j, 2), space.table);
  const differing = largest
    .map((digit, k) => v128.xor(digit, v128.load(counts, arrays.counts + vectorBytes * k)))
    .reduce((a, b) => v128.or(a, b));
  return [
    waiting.set(mask(control.active)),
    countLoop(j, { from: 0, to: space.n, step: 1 }, [
      vector.set(place),
      counts.set(i32.mul(vector, arrays.digits)),
      flips.set(v128.andnot(waiting, differing)),
      ...(single ? [waiting.set(v128.andnot(waiting, flips))] : []),
      flips.set(v128.xor(flips, v128.load(vector, arrays.word))),
      putTwice(plan, { address: vector, offset: 0 }, arrays.word, plan.H.cols, flips),
    ]),
  ];
}
