/** Sum-product decoding, flooding, four frames a word, in 32-bit floats. Everything is kept as a ratio e^L = P(0)/P(1)
 *  in place of the log-likelihood ratio L, so that no logarithm is needed:
 *
 *  - a bit's message to a check is its total T over the check's message g, and tanh(L/2) = (T − g)/(T + g) =: d;
 *  - with P the product of a check's d, the check's message back is (1 + P/d)/(1 − P/d) = (d + P)/(d − P);
 *  - a bit's total is its channel ratio times its checks' messages.
 *
 *  Multiplication by factors of size at most 1 is monotone under rounding, so |P| ≤ |d|; P taken down by 2^-22 keeps
 *  d − P from 0 and messages within e^±16, where the readable decoder has room to e^±35: both are beyond what decides a
 *  bit. Totals are held within 10^±30 as they are multiplied up. A total ends in two bits of its own: the lowest is the
 *  decision, the next is 0, and it is 1 in every message, so that T and g never cancel to 0/0. Not equal to the readable
 *  decoder bit for bit: agreement is within the interval of a measured rate. */

import {
  base,
  type FunctionRef,
  f32,
  f32x4,
  type Local,
  ModuleBuilder,
  type Statement,
  type V128,
  v128,
} from './assembler/index.ts';
import { arrayBytes } from './bit-words.ts';
import { eachVector, emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { rowTables, type SideTables, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { ratioLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { allFloats, emitSoftSyndrome, emitSoftWeigh, laneMask } from './soft-words.ts';
import { at, put } from './votes.ts';

const nothing = { params: [], results: [] } as const;
const lanes = 4;

const most = 1e30;
const least = 1e-30;
/** 1 − 2^-22. */
const shrink = 1 - 2 ** -22;
/** Totals this near to 1 say nothing: the received bit stands. */
const undecided = 1e-6;

const lowBits = (bits: number): V128 => v128.ofBytes([0, 1, 2, 3].flatMap(() => [bits, 0, 0, 0]));

interface Arrays {
  channel: number;
  totals: number;
  /** Products under way, from the channel's ratio on; twice over for a circulant. */
  products: number;
  /** Messages of the checks, an edge each, rows together; the d of the row in hand while it is worked on. */
  messages: number;
}

export function sumProductKernel(plan: GraphPlan, cap: number): KernelImage {
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, cap);
  const arrays: Arrays = {
    channel: layout.reserve(vectorBytes * H.cols),
    totals: layout.reserve(arrayBytes(plan, H.cols)),
    products: layout.reserve(arrayBytes(plan, H.cols)),
    messages: layout.reserve(vectorBytes * H.colIndex.length),
  };
  const rows = rowTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes,
    refillAt: 1,
    cap,
    positions: positions.space,
    word: ratioLanes(arrays.channel),
    clear: emitClear(m, plan, arrays),
    filled: emitFilled(m, plan, arrays),
    syndrome: emitSoftSyndrome(m, layout, plan, rows, lanes, arrays.totals),
    iterate: emitIterate(m, plan, rows, arrays),
    beforeWeighing: null,
    weigh: emitSoftWeigh(m, H.cols, lanes, arrays.totals),
  });
  const stepNs = 4 * H.colIndex.length;
  return finishKernel(m, layout, { n: H.cols, cap, places, word: arrays.channel, stepNs, tables: [rows, positions] });
}

/** The channel's ratio for a received 0 in the lanes that hold no frame. */
function emitClear(m: ModuleBuilder, plan: GraphPlan, { channel }: Arrays): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const active = f.local('v128');
    const zero = f.local('v128');
    f.emit(
      active.set(laneMask(lanes, control.active)),
      zero.set(f32x4.splat(f32.load(base, control.parameter))),
      eachVector(i, plan.H.cols, [v128.store(i, v128.bitselect(v128.load(i, channel), zero, active), channel)]),
    );
  });
}

/** Totals of the fresh lanes begin as the channel's ratios, and so do the products of all lanes. */
function emitFilled(m: ModuleBuilder, plan: GraphPlan, arrays: Arrays): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const fresh = f.local('v128');
    const total = f.local('v128');
    const ratio = v128.load(i, arrays.channel);
    f.emit(
      fresh.set(laneMask(lanes, control.fresh)),
      eachVector(i, plan.H.cols, [
        total.set(v128.bitselect(ratio, v128.load(i, arrays.totals), fresh)),
        ...storeTotal(plan, i, total, ratio, arrays),
      ]),
    );
  });
}

/** Stores a total with its decision in the lowest bits, and starts the next products. */
function storeTotal(
  plan: GraphPlan,
  i: Local<'i32'>,
  total: Local<'v128'>,
  ratio: V128,
  { totals, products }: Arrays,
): Statement[] {
  const received = f32x4.lt(ratio, allFloats(1));
  const limit = v128.bitselect(allFloats(1 + undecided), allFloats(1 - undecided), received);
  const decision = v128.and(f32x4.lt(total, limit), lowBits(1));
  const marked = v128.or(v128.andnot(total, lowBits(3)), decision);
  const second = vectorBytes * plan.H.cols;
  const code = [total.set(marked), v128.store(i, total, totals), v128.store(i, ratio, products)];
  if (!plan.circulant) return code;
  return [...code, v128.store(i, total, totals + second), v128.store(i, allFloats(1), products + second)];
}

function emitIterate(m: ModuleBuilder, plan: GraphPlan, rows: SideTables, arrays: Arrays): FunctionRef {
  const { channel, totals, products, messages } = arrays;
  return m.func(nothing, (f) => {
    const vector = () => f.local('v128');
    const [kept, freshOnes, product, d, message, low, high] = Array.from({ length: 7 }, vector) as [
      Local<'v128'>,
      Local<'v128'>,
      Local<'v128'>,
      Local<'v128'>,
      Local<'v128'>,
      Local<'v128'>,
      Local<'v128'>,
    ];
    const i = f.local('i32');
    const within = (value: V128) => f32x4.pmax(f32x4.pmin(value, high), low);
    f.emit(
      // Fresh lanes have no messages yet: 1, with the bit that every message has.
      kept.set(v128.not(laneMask(lanes, control.fresh))),
      freshOnes.set(v128.andnot(v128.or(allFloats(1), lowBits(2)), kept)),
      low.set(allFloats(least)),
      high.set(allFloats(most)),
      walk(f, rows, (check) => [
        product.set(allFloats(shrink)),
        check.eachNeighbour((bit, edge) => [
          message.set(v128.or(v128.and(at(edge, messages), kept), freshOnes)),
          d.set(at(bit, totals)),
          d.set(f32x4.div(f32x4.sub(d, message), f32x4.add(d, message))),
          put(edge, messages, d),
          product.set(f32x4.mul(product, d)),
        ]),
        check.eachNeighbour((bit, edge) => [
          d.set(at(edge, messages)),
          message.set(v128.or(f32x4.div(f32x4.add(d, product), f32x4.sub(d, product)), lowBits(2))),
          put(edge, messages, message),
          put(bit, products, within(f32x4.mul(at(bit, products), message))),
        ]),
      ]),
    );
    const wrapped = v128.load(i, products + vectorBytes * plan.H.cols);
    const total = v128.load(i, products);
    f.emit(
      eachVector(i, plan.H.cols, [
        d.set(plan.circulant ? within(f32x4.mul(total, wrapped)) : total),
        ...storeTotal(plan, i, d, v128.load(i, channel), arrays),
      ]),
    );
  });
}
