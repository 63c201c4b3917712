/** Gallager's hard message passing, 128 frames a word.
 *
 *  With D the number of a bit's checks that disagree with the received y, and d_t = 1 where the check of edge t is one
 *  of them, the message on edge t is y inverted when D − d_t ≥ b: that is y ⊕ [D ≥ b] on every edge, except that where
 *  D = b exactly the disagreeing edges keep y. So a bit has one message for all its edges but in the rare frames with
 *  D = b. The checks are summed from those common messages, like a syndrome, and the exceptions are kept apart as
 *  corrections: bits of each edge (D = b and d_t) and their sum at each check, walked only for bits that have some. */

import { abovePlanes, atLeastPlanes } from './adder-network.ts';
import {
  base,
  type FunctionBuilder,
  type FunctionRef,
  i32,
  type Local,
  ModuleBuilder,
  memoryFill,
  type Statement,
  type V128,
  v128,
  when,
} from './assembler/index.ts';
import { arrayBytes, emitClear, emitFilled, mask, noteWrong, putTwice } from './bit-words.ts';
import { type ConductorPlaces, emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { columnTables, type Place, rowTables, type SideTables, type Site, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { bitLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { reserveSchedule, type Schedule } from './threshold-schedule.ts';
import { at, countNeighbours, parityInto, put, reaches } from './votes.ts';
import { emitWeighing } from './weighing.ts';

export interface GallagerRule {
  cap: number;
  /** Thresholds by iteration, the last standing for the rest, where they change; null when the plan's settings hold. */
  schedule: readonly number[] | null;
  /** Whether every bit's threshold is ⌈d/2⌉ in all iterations, so that messages invert where decisions do. */
  messagesAreDecisions: boolean;
}

interface Arrays {
  /** Decisions; fresh frames are drawn into it. */
  word: number;
  received: number;
  /** Common messages: the word itself where messages are decisions. */
  sent: number;
  sums: number;
  /** Corrections summed at each check. */
  checkCorrections: number;
  /** Corrections of each edge, good where the bit is marked. */
  edgeCorrections: number;
  marks: number;
  /** A word that is not zero when any check has corrections. */
  dirty: number;
}

const refillAt = 40;

/** @param plan Its settings are the threshold b and ⌈d/2⌉ of each column. */
export function gallagerKernel(plan: GraphPlan, rule: GallagerRule): KernelImage {
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, rule.cap);
  const word = layout.reserve(arrayBytes(plan, H.cols));
  const arrays: Arrays = {
    word,
    received: layout.reserve(vectorBytes * H.cols),
    sent: rule.messagesAreDecisions ? word : layout.reserve(arrayBytes(plan, H.cols)),
    sums: layout.reserve(arrayBytes(plan, H.rows)),
    checkCorrections: layout.reserve(arrayBytes(plan, H.rows)),
    edgeCorrections: layout.reserve(vectorBytes * H.colIndex.length),
    marks: layout.reserve(vectorBytes * H.cols),
    dirty: layout.reserve(vectorBytes),
  };
  const rows = rowTables(plan, layout);
  const columns = columnTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const schedule = rule.schedule && reserveSchedule(layout, rule.schedule, rule.cap);
  const takers = [{ array: arrays.received, twice: false }];
  if (!rule.messagesAreDecisions) takers.push({ array: arrays.sent, twice: true });
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes: 128,
    refillAt,
    cap: rule.cap,
    positions: positions.space,
    word: bitLanes(word),
    clear: emitClear(m, H.cols, word),
    filled: emitFilled(m, plan, word, takers),
    syndrome: emitSums(m, plan, rows, arrays),
    iterate: emitMessages(m, plan, columns, arrays, schedule, places),
    ...emitWeighing(m, layout, H.cols, word),
  });
  const tables = [rows, columns, positions, ...(schedule ? [schedule] : [])];
  return finishKernel(m, layout, { n: H.cols, cap: rule.cap, places, word, stepNs: H.colIndex.length, tables });
}

/** Each check's sum of all its messages, and the syndrome of the decisions. A fresh lane has no corrections. */
function emitSums(m: ModuleBuilder, plan: GraphPlan, rows: SideTables, arrays: Arrays): FunctionRef {
  const { word, sent, sums, checkCorrections } = arrays;
  return m.func({ params: [], results: [] }, (f) => {
    const fresh = f.local('v128');
    const sum = f.local('v128');
    const failing = f.local('v128');
    const second = vectorBytes * plan.H.rows;
    const corrections = (row: Site): V128 =>
      plan.circulant
        ? v128.xor(at(row.own, checkCorrections), at(row.own, checkCorrections + second))
        : at(row.own, checkCorrections);
    f.emit(
      fresh.set(mask(control.fresh)),
      walk(f, rows, (row) => [
        ...parityInto(row, sum, (bit) => at(bit, word)),
        failing.set(v128.or(failing, sum)),
        ...(sent === word ? [] : parityInto(row, sum, (bit) => at(bit, sent))),
        sum.set(v128.xor(sum, v128.andnot(corrections(row), fresh))),
        putTwice(plan, row.own, sums, plan.H.rows, sum),
      ]),
      v128.store(base, failing, control.failing),
      noteWrong(f, plan.H.cols, word),
    );
  });
}

/** Locals that the body for one bit works with. */
interface BitLocals {
  active: Local<'v128'>;
  /** Lanes whose corrections are their own. */
  kept: Local<'v128'>;
  /** Whether the common message so far was inverted. */
  inverted: Local<'v128'>;
  /** Lanes with D = b. */
  exact: Local<'v128'>;
  reached: Local<'v128'>;
  decided: Local<'v128'>;
}

/** Decisions and messages of one iteration. */
function emitMessages(
  m: ModuleBuilder,
  plan: GraphPlan,
  columns: SideTables,
  arrays: Arrays,
  schedule: Schedule | null,
  places: ConductorPlaces,
): FunctionRef {
  return m.func({ params: [], results: [] }, (f) => {
    const vector = () => f.local('v128');
    const names = ['active', 'kept', 'inverted', 'exact', 'reached', 'decided'] as const;
    const v = Object.fromEntries(names.map((name) => [name, vector()])) as unknown as BitLocals;
    const thresholds = schedule ? schedule.emitPlanes(f, plan.largestColumn, places, v.active) : null;
    f.emit(
      v.active.set(mask(control.active)),
      v.kept.set(v128.andnot(v.active, mask(control.fresh))),
      forgetCorrections(plan, arrays),
      ...(thresholds ? thresholds.code : []),
      walk(f, columns, (bit) => [
        v.inverted.set(v128.xor(at(bit.own, arrays.sent), at(bit.own, arrays.received))),
        when(
          isMarked(bit, arrays),
          compare(f, plan, bit, arrays, v, thresholds?.planes ?? null, (edge) =>
            v128.and(at(edge, arrays.edgeCorrections), v.kept),
          ),
          compare(f, plan, bit, arrays, v, thresholds?.planes ?? null, null),
        ),
        putTwice(plan, bit.own, arrays.word, plan.H.cols, v128.xor(at(bit.own, arrays.received), v.decided)),
        ...(arrays.sent === arrays.word
          ? []
          : [putTwice(plan, bit.own, arrays.sent, plan.H.cols, v128.xor(at(bit.own, arrays.received), v.reached))]),
        when(v128.anyTrue(v.exact), correct(f, bit, arrays, v), [mark(bit, arrays, 0)]),
      ]),
    );
  });
}

const isMarked = (bit: Site, arrays: Arrays) => i32.load(bit.own.address, arrays.marks);
const mark = (bit: Site, arrays: Arrays, value: 0 | 1): Statement =>
  i32.store(bit.own.address, i32.of(value), arrays.marks);

function forgetCorrections(plan: GraphPlan, { checkCorrections, dirty }: Arrays): Statement {
  return when(i32.load(base, dirty), [
    memoryFill(i32.of(checkCorrections), i32.of(0), i32.of(arrayBytes(plan, plan.H.rows))),
    i32.store(base, i32.of(0), dirty),
  ]);
}

/** Counts the disagreeing checks and sets `reached`, `exact` and `decided`. */
function compare(
  f: FunctionBuilder,
  plan: GraphPlan,
  bit: Site,
  arrays: Arrays,
  v: BitLocals,
  thresholds: readonly V128[] | null,
  correction: ((edge: Place) => V128) | null,
): Statement[] {
  const disagrees = (check: Place, edge: Place): V128 => {
    const common = v128.xor(at(check, arrays.sums), v.inverted);
    return correction ? v128.xor(common, correction(edge)) : common;
  };
  const { code, planes } = countNeighbours(f, bit, disagrees, { largest: plan.largestColumn + 1 });
  f.giveBack(...planes);
  const b = bit.setting(0);
  const half = reaches(planes, bit.setting(1));
  const reached = thresholds ? atLeastPlanes(planes, thresholds) : reaches(planes, b);
  const passed = thresholds
    ? abovePlanes(planes, thresholds)
    : reaches(planes, typeof b === 'number' ? b + 1 : i32.add(b, 1));
  return [
    ...code,
    v.reached.set(reached),
    v.exact.set(v128.and(v128.andnot(v.reached, passed), v.active)),
    v.decided.set(arrays.sent === arrays.word ? v.reached : half),
  ];
}

/** Writes the corrections of a bit: the edges that disagree in the lanes with D = b. */
function correct(f: FunctionBuilder, bit: Site, arrays: Arrays, v: BitLocals): Statement[] {
  const { sums, edgeCorrections, checkCorrections } = arrays;
  const before = f.borrow('v128');
  const now = f.borrow('v128');
  const code = [
    // All ones where the edge corrections are good from the last iteration, else zeros.
    before.set(v128.zero),
    when(isMarked(bit, arrays), [before.set(v.kept)]),
    mark(bit, arrays, 1),
    i32.store(base, i32.of(1), arrays.dirty),
    bit.eachNeighbour((check, edge) => [
      now.set(v128.xor(at(check, sums), v128.xor(v.inverted, v128.and(at(edge, edgeCorrections), before)))),
      now.set(v128.and(now, v.exact)),
      put(edge, edgeCorrections, now),
      put(check, checkCorrections, v128.xor(at(check, checkCorrections), now)),
    ]),
  ];
  f.giveBack(before, now);
  return code;
}
