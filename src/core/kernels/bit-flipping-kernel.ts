/** Majority logic, parallel bit flipping and gradient descent with several flips, 128 frames a word. All three flip a bit
 *  when enough of its checks fail; gradient descent counts a difference from the received bit as one more. */

import { base, type FunctionRef, ModuleBuilder, v128 } from './assembler/index.ts';
import { arrayBytes, emitClear, emitFilled, emitSyndrome, mask, putTwice } from './bit-words.ts';
import { emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { columnTables, rowTables, type SideTables, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { bitLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { at, countNeighbours, reaches } from './votes.ts';
import { emitWeighing } from './weighing.ts';

export interface FlippingRule {
  cap: number;
  /** Whether a bit that differs from the received one counts as one more failing check. */
  remembersReceived: boolean;
  /** Whether a frame in which nothing is flipped ends there, the iteration not counted. */
  stopsWhenStuck: boolean;
}

/** Free lanes for which a second syndrome pass, about a third of a step, costs less than the step they would wait. */
const refillAt = 40;

/** @param plan Its one setting is the least count that flips each bit. */
export function bitFlippingKernel(plan: GraphPlan, rule: FlippingRule): KernelImage {
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, rule.cap);
  const arrays = {
    word: layout.reserve(arrayBytes(plan, H.cols)),
    syndrome: layout.reserve(arrayBytes(plan, H.rows)),
    received: rule.remembersReceived ? layout.reserve(vectorBytes * H.cols) : null,
  };
  const rows = rowTables(plan, layout);
  const columns = columnTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes: 128,
    refillAt,
    cap: rule.cap,
    positions: positions.space,
    word: bitLanes(arrays.word),
    clear: emitClear(m, H.cols, arrays.word),
    filled: emitFilled(
      m,
      plan,
      arrays.word,
      arrays.received === null ? [] : [{ array: arrays.received, twice: false }],
    ),
    syndrome: emitSyndrome(m, plan, rows, arrays),
    iterate: emitFlips(m, plan, columns, arrays, rule),
    ...emitWeighing(m, layout, H.cols, arrays.word),
  });
  const stepNs = 0.7 * H.colIndex.length;
  return finishKernel(m, layout, {
    n: H.cols,
    cap: rule.cap,
    places,
    word: arrays.word,
    stepNs,
    tables: [rows, columns, positions],
  });
}

interface Arrays {
  word: number;
  syndrome: number;
  received: number | null;
}

function emitFlips(
  m: ModuleBuilder,
  plan: GraphPlan,
  columns: SideTables,
  { word, syndrome, received }: Arrays,
  rule: FlippingRule,
): FunctionRef {
  return m.func({ params: [], results: [] }, (f) => {
    const active = f.local('v128');
    const flips = f.local('v128');
    const flipped = f.local('v128');
    f.emit(
      active.set(mask(control.active)),
      walk(f, columns, (column) => {
        const old = at(column.own, word);
        const votes = countNeighbours(f, column, (check) => at(check, syndrome), {
          extra: received === null ? undefined : v128.xor(old, at(column.own, received)),
          largest: plan.largestColumn + 2,
        });
        f.giveBack(...votes.planes);
        return [
          ...votes.code,
          flips.set(v128.and(reaches(votes.planes, column.setting(0)), active)),
          ...(rule.stopsWhenStuck ? [flipped.set(v128.or(flipped, flips))] : []),
          flips.set(v128.xor(flips, old)),
          putTwice(plan, column.own, word, plan.H.cols, flips),
        ];
      }),
    );
    if (rule.stopsWhenStuck) f.emit(v128.store(base, v128.andnot(active, flipped), control.stuck));
  });
}
