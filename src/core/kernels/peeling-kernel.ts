/** Peeling of erasures, 128 frames a word: a one stands for an erased bit. An iteration is a pass through the checks in
 *  index order, each solved at once, as in the readable decoder; the all-zero word is sent, so that what is solved is 0. */

import { base, type FunctionRef, ModuleBuilder, v128, when } from './assembler/index.ts';
import { emitClear, emitFilled, mask, noteWrong } from './bit-words.ts';
import { emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { rowTables, type SideTables, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { bitLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { at, put } from './votes.ts';
import { emitWeighing } from './weighing.ts';

const nothing = { params: [], results: [] } as const;

/** Passes over the words to fill lanes cost little beside an iteration. */
const refillAt = 8;

/** @param given Made with its rows in order. */
export function peelingKernel(given: GraphPlan, cap: number): KernelImage {
  // Words change in place, which two copies of a circulant would hinder.
  const plan = { ...given, circulant: null };
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, cap);
  const word = layout.reserve(vectorBytes * H.cols);
  const rows = rowTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes: 128,
    refillAt,
    cap,
    positions: positions.space,
    word: bitLanes(word),
    clear: emitClear(m, H.cols, word),
    filled: emitFilled(m, plan, word, []),
    syndrome: emitErased(m, H.cols, word),
    iterate: emitPass(m, rows, word),
    ...emitWeighing(m, layout, H.cols, word),
  });
  return finishKernel(m, layout, {
    n: H.cols,
    cap,
    places,
    word,
    stepNs: 2 * H.colIndex.length,
    tables: [rows, positions],
  });
}

/** A frame with erasures left is both unfinished and wrong. */
function emitErased(m: ModuleBuilder, n: number, word: number): FunctionRef {
  return m.func(nothing, (f) => {
    f.emit(noteWrong(f, n, word), v128.store(base, mask(control.wrong), control.failing));
  });
}

function emitPass(m: ModuleBuilder, rows: SideTables, word: number): FunctionRef {
  return m.func(nothing, (f) => {
    const once = f.local('v128');
    const twice = f.local('v128');
    const solved = f.local('v128');
    f.emit(
      walk(f, rows, (check) => [
        once.set(v128.zero),
        twice.set(v128.zero),
        check.eachNeighbour((bit) => [
          twice.set(v128.or(twice, v128.and(once, at(bit, word)))),
          once.set(v128.or(once, at(bit, word))),
        ]),
        // Lanes where exactly one bit of the check is erased: no other has a one to lose.
        once.set(v128.andnot(once, twice)),
        when(v128.anyTrue(once), [
          solved.set(v128.or(solved, once)),
          check.eachNeighbour((bit) => [put(bit, word, v128.andnot(at(bit, word), once))]),
        ]),
      ]),
      v128.store(base, v128.andnot(mask(control.active), solved), control.stuck),
    );
  });
}
