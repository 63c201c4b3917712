/** Words of frames with a byte (16 lanes) or a double (2 lanes) a bit: how their masks, decisions and syndromes are told.
 *  A decision is the sign of a lane, so that the XOR of a check's words holds the check's parity in the same place. */

import {
  base,
  type Expr,
  type FunctionBuilder,
  type FunctionRef,
  i8x16,
  i16x8,
  i32,
  i32x4,
  i64x2,
  type Local,
  type ModuleBuilder,
  memoryCopy,
  type Statement,
  sequence,
  type V128,
  v128,
} from './assembler/index.ts';
import { eachVector } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { type SideTables, walk } from './graph-walk.ts';
import { control, type MemoryLayout, vectorBytes } from './memory-layout.ts';
import { at, parityInto } from './votes.ts';

export type SoftLanes = 16 | 2;

/** All ones in the lanes that a mask of the control block names. */
export function laneMask(lanes: SoftLanes, place: number): V128 {
  const bits = i32.load(base, place);
  if (lanes === 2) {
    const own = v128.ofBytes([1, 2].flatMap((bit) => [bit, 0, 0, 0, 0, 0, 0, 0]));
    return i64x2.eq(v128.and(i32x4.splat(bits), own), own);
  }
  const own = v128.ofBytes(Array.from({ length: 16 }, (_, lane) => 1 << (lane & 7)));
  const spread = v128.shuffle(i16x8.splat(bits), v128.zero, [0, 0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 1, 1, 1, 1]);
  return i8x16.eq(v128.and(spread, own), own);
}

/** One bit a lane: its decision. */
export const decisionsOf = (lanes: SoftLanes, word: V128): Expr<'i32'> =>
  lanes === 16 ? i8x16.bitmask(word) : i64x2.bitmask(word);

/** Bytes of a position's decisions when they are packed. */
const packedBytes = (lanes: SoftLanes) => (lanes === 16 ? 2 : 1);

/** Emits the syndrome pass over the words. */
export function emitSoftSyndrome(
  m: ModuleBuilder,
  layout: MemoryLayout,
  plan: GraphPlan,
  rows: SideTables,
  lanes: SoftLanes,
  words: number,
): FunctionRef {
  const packed = plan.circulant ? layout.reserve(packedBytes(lanes) * 2 * plan.H.cols + 2 * vectorBytes) : 0;
  return m.func({ params: [], results: [] }, (f) => {
    const wrong = f.local('i32');
    const failing = f.local('i32');
    const pass = plan.circulant
      ? packedPass(f, plan.circulant, plan.H.cols, lanes, { words, packed }, { wrong, failing })
      : wordPass(f, plan, rows, lanes, words, { wrong, failing });
    f.emit(pass, i32.store(base, wrong, control.wrong), i32.store(base, failing, control.failing));
  });
}

interface Found {
  wrong: Local<'i32'>;
  failing: Local<'i32'>;
}

function wordPass(
  f: FunctionBuilder,
  plan: GraphPlan,
  rows: SideTables,
  lanes: SoftLanes,
  words: number,
  { wrong, failing }: Found,
): Statement {
  const i = f.local('i32');
  const sum = f.local('v128');
  const any = f.local('v128');
  return sequence(
    eachVector(i, plan.H.cols, [any.set(v128.or(any, v128.load(i, words)))]),
    wrong.set(decisionsOf(lanes, any)),
    any.set(v128.zero),
    walk(f, rows, (row) => [...parityInto(row, sum, (bit) => at(bit, words)), any.set(v128.or(any, sum))]),
    failing.set(decisionsOf(lanes, any)),
  );
}

/** The decisions packed to a byte or two a position, kept twice over: one XOR then serves 16 or 8 checks of a circulant. */
function packedPass(
  f: FunctionBuilder,
  offsets: readonly number[],
  n: number,
  lanes: SoftLanes,
  { words, packed }: { words: number; packed: number },
  { wrong, failing }: Found,
): Statement {
  const size = packedBytes(lanes);
  const i = f.local('i32');
  const decided = f.local('i32');
  const any = f.local('v128');
  const store = lanes === 16 ? i32.store16 : i32.store8;
  // Byte offset of position i among the packed decisions, from its byte offset among the words.
  const at = i32.shrU(i, lanes === 16 ? 3 : 4);
  const checks = offsets.map((d) => v128.loadUnaligned(i, packed + size * d)).reduce((a, b) => v128.xor(a, b));
  return sequence(
    eachVector(i, n, [
      decided.set(decisionsOf(lanes, v128.load(i, words))),
      wrong.set(i32.or(wrong, decided)),
      store(at, decided, packed),
    ]),
    memoryCopy(i32.of(packed + size * n), i32.of(packed), i32.of(size * n)),
    // The last vector may reach past check n − 1: it then sees checks 0, 1, … again, or, past 2n, zeros of no check.
    ...checkLoop(i, any, checks, n, size),
    failing.set(foldLanes(any, lanes)),
  );
}

function checkLoop(i: Local<'i32'>, any: Local<'v128'>, checks: V128, n: number, size: number): Statement[] {
  const perVector = vectorBytes / size;
  const whole = Math.floor(n / perVector);
  const rest = n % perVector;
  const one = [any.set(v128.or(any, checks))];
  const code = whole > 0 ? [eachVector(i, whole, one)] : [];
  if (rest === 0) return code;
  const kept = v128.ofBytes(Array.from({ length: vectorBytes }, (_, b) => (b < rest * size ? 255 : 0)));
  return [...code, i.set(whole * vectorBytes), any.set(v128.or(any, v128.and(checks, kept)))];
}

/** The lanes with a one in any of a vector's packed positions. */
function foldLanes(any: Local<'v128'>, lanes: SoftLanes): Expr<'i32'> {
  const words = [0, 1, 2, 3].map((k) => i32x4.extract(any, k)).reduce((a, b) => i32.or(a, b));
  const halves = i32.or(words, i32.shrU(words, 16));
  return lanes === 16 ? i32.and(halves, 0xffff) : i32.and(i32.or(halves, i32.shrU(halves, 8)), 3);
}

/** Wrong bits of one lane, from its number. */
export function emitSoftWeigh(m: ModuleBuilder, n: number, lanes: SoftLanes, words: number): FunctionRef {
  return m.func({ params: ['i32'], results: ['i32'] }, (f) => {
    const lane = f.param(0, 'i32');
    const i = f.local('i32');
    const count = f.local('i32');
    const sign = i32.shrU(i32.load8U(i32.add(i, lane), words), 7);
    f.emit(
      // The byte that holds the lane's sign.
      ...(lanes === 2 ? [lane.set(i32.add(i32.shl(lane, 3), 7))] : []),
      eachVector(i, n, [count.set(i32.add(count, sign))]),
      count,
    );
  });
}

/** The constant in both doubles. */
export const bothDoubles = (value: number): V128 => {
  const bytes = [...new Uint8Array(new Float64Array([value]).buffer)];
  return v128.ofBytes([...bytes, ...bytes]);
};

/** The constant in all sixteen bytes. */
export const allBytes = (value: number): V128 => v128.ofBytes(new Array<number>(16).fill(value & 255));
