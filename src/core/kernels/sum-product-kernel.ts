/** Sum-product decoding, flooding, two frames a word, in double precision. A log-likelihood ratio L is kept as
 *  x = tanh(L/2), so that neither tanh nor its inverse is ever computed:
 *
 *  - a check sends a bit the product of the others' x, by products from the left and from the right;
 *  - e^L = (1 + x)/(1 − x), so that a bit's total is R = A/B, the product of the 1 + x of its messages and of the
 *    channel over that of the 1 − x, divided once a bit;
 *  - without one message that is R·(1 − x) : 1 + x, and a : b has tanh(L/2) = (a − b)/(a + b).
 *
 *  Frames that never settle drive messages to the cuts at ±30 and 1 − 10^-15, where their course depends on how 1 − x is
 *  rounded. Hence double precision and the readable decoder's order of products: 32 bits agree in frame errors but not
 *  in the bit errors of such frames. Agreement is within the interval of a measured rate, not bit for bit. */

import {
  base,
  type FunctionBuilder,
  type FunctionRef,
  f64,
  f64x2,
  type Local,
  ModuleBuilder,
  type Statement,
  sequence,
  type V128,
  v128,
} from './assembler/index.ts';
import { arrayBytes } from './bit-words.ts';
import { eachVector, emitConductor, reserveConductor } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { type Place, rowTables, type SideTables, type Site, walk } from './graph-walk.ts';
import { finishKernel, type KernelImage, positionSpace } from './kernel-image.ts';
import { doubleLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { bothDoubles, emitSoftSyndrome, emitSoftWeigh, laneMask } from './soft-words.ts';
import { at, put } from './votes.ts';

const nothing = { params: [], results: [] } as const;
const lanes = 2;

/** tanh(30/2): messages to checks are cut at ±30. */
const largestFactor = Math.tanh(15);
const largestProduct = 1 - 1e-15;
/** |L| ≤ 10^-9 says nothing: |A − B| ≤ 5·10^-10·(A + B). */
const undecided = 5e-10;
/** Least A and B. */
const least = 1e-290;
/** Most of R = A/B. Without one message, which is 2·10^15 at most, such a total is still beyond the cut at ±30. */
const mostRatio = 1e300;

/** Column weight up to which products of any messages stay in range when each 1 ± x is taken 2^21 times: between 2^-22
 *  and 2^22 it then is. Above it products are held from falling below the least, which tells on a total only when more
 *  than twenty messages stand at their cut for each value. */
const freeColumn = 44;
const scaleOf = (plan: GraphPlan): number => (plan.largestColumn <= freeColumn ? 2 ** 21 : 1);

interface Arrays {
  /** ±tanh(L/2) of the channel, negative for a received 1. */
  channel: number;
  /** Totals R = A/B; twice over for a circulant. */
  ratio: number;
  /** The next A and B as they are multiplied up; twice over for a circulant. */
  nextZeros: number;
  nextOnes: number;
  /** Words whose sign is the decision. */
  decisions: number;
  /** Messages x of the checks times the scale, an edge each, rows together. */
  messages: number;
  /** The factors of the row in hand, and their products from the left: apart from the messages, which are too many for
   *  the processor's nearest cache. */
  factors: number;
  products: number;
}

export function sumProductKernel(plan: GraphPlan, cap: number): KernelImage {
  const { H } = plan;
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, cap);
  const perBit = () => layout.reserve(arrayBytes(plan, H.cols));
  const arrays: Arrays = {
    channel: layout.reserve(vectorBytes * H.cols),
    ratio: perBit(),
    nextZeros: perBit(),
    nextOnes: perBit(),
    decisions: layout.reserve(vectorBytes * H.cols),
    messages: layout.reserve(vectorBytes * H.colIndex.length),
    factors: layout.reserve(vectorBytes * plan.largestRow),
    products: layout.reserve(vectorBytes * plan.largestRow),
  };
  const rows = rowTables(plan, layout);
  const positions = positionSpace(plan, layout);
  const m = new ModuleBuilder();
  emitConductor(m, places, {
    lanes,
    refillAt: 1,
    cap,
    positions: positions.space,
    word: doubleLanes(arrays.channel),
    clear: emitClear(m, plan, arrays),
    filled: emitFilled(m, plan, arrays),
    syndrome: emitSoftSyndrome(m, layout, plan, rows, lanes, arrays.decisions),
    iterate: emitIterate(m, plan, rows, arrays),
    beforeWeighing: null,
    weigh: emitSoftWeigh(m, H.cols, lanes, arrays.decisions),
  });
  const stepNs = 5 * H.colIndex.length;
  return finishKernel(m, layout, { n: H.cols, cap, places, word: arrays.channel, stepNs, tables: [rows, positions] });
}

/** The channel's value of a received 0 in the lanes that hold no frame. */
function emitClear(m: ModuleBuilder, plan: GraphPlan, { channel }: Arrays): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const active = f.local('v128');
    const zero = f.local('v128');
    f.emit(
      active.set(laneMask(lanes, control.active)),
      zero.set(f64x2.splat(f64.load(base, control.parameter))),
      eachVector(i, plan.H.cols, [v128.store(i, v128.bitselect(v128.load(i, channel), zero, active), channel)]),
    );
  });
}

const oneMore = (x: V128): V128 => f64x2.add(bothDoubles(1), x);
const oneLess = (x: V128): V128 => f64x2.sub(bothDoubles(1), x);
const within = (x: V128, most: number): V128 => f64x2.pmax(f64x2.pmin(x, bothDoubles(most)), bothDoubles(-most));

/** Totals of the fresh lanes begin as the channel's. */
function emitFilled(m: ModuleBuilder, plan: GraphPlan, arrays: Arrays): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const fresh = f.local('v128');
    const channel = v128.load(i, arrays.channel);
    const taken = (value: V128, array: number) => v128.bitselect(value, v128.load(i, array), fresh);
    f.emit(
      fresh.set(laneMask(lanes, control.fresh)),
      storeTotals(f, plan, i, arrays, oneMore(channel), oneLess(channel), taken),
    );
  });
}

/** Stores totals and decisions of all bits, as far as they are `taken`, and starts the next products with the channel. */
function storeTotals(
  f: FunctionBuilder,
  plan: GraphPlan,
  i: Local<'i32'>,
  arrays: Arrays,
  zerosNow: V128,
  onesNow: V128,
  taken: (value: V128, array: number) => V128 = (value) => value,
): Statement {
  const [zeros, ones, channel, ratio] = [f.local('v128'), f.local('v128'), f.local('v128'), f.local('v128')];
  const margin = f.local('v128');
  const second = vectorBytes * plan.H.cols;
  const copies = plan.circulant ? [0, second] : [0];
  const store = (array: number, value: V128) => copies.map((copy) => v128.store(i, value, array + copy));
  return eachVector(i, plan.H.cols, [
    zeros.set(zerosNow),
    ones.set(onesNow),
    channel.set(v128.load(i, arrays.channel)),
    ratio.set(taken(f64x2.pmin(f64x2.div(zeros, ones), bothDoubles(mostRatio)), arrays.ratio)),
    ...store(arrays.ratio, ratio),
    v128.store(i, oneMore(channel), arrays.nextZeros),
    v128.store(i, oneLess(channel), arrays.nextOnes),
    ...copies
      .slice(1)
      .flatMap((copy) => [arrays.nextZeros, arrays.nextOnes].map((next) => v128.store(i, bothDoubles(1), next + copy))),
    // A − B below −margin is a 1, or below the margin where a 1 was received.
    margin.set(f64x2.mul(f64x2.add(zeros, ones), bothDoubles(-undecided))),
    margin.set(v128.xor(margin, v128.and(channel, bothDoubles(-0)))),
    v128.store(i, taken(f64x2.lt(f64x2.sub(zeros, ones), margin), arrays.decisions), arrays.decisions),
  ]);
}

function emitIterate(m: ModuleBuilder, plan: GraphPlan, rows: SideTables, arrays: Arrays): FunctionRef {
  return m.func(nothing, (f) => {
    const kept = f.local('v128');
    const i = f.local('i32');
    const second = vectorBytes * plan.H.cols;
    const whole = (next: number): V128 => {
      const product = v128.load(i, next);
      const all = plan.circulant ? f64x2.mul(product, v128.load(i, next + second)) : product;
      return f64x2.pmax(all, bothDoubles(least));
    };
    f.emit(
      // Fresh lanes have had no message yet: x = 0.
      kept.set(v128.not(laneMask(lanes, control.fresh))),
      walk(f, rows, (check) => checkPass(f, check, arrays, kept, scaleOf(plan))),
      storeTotals(f, plan, i, arrays, whole(arrays.nextZeros), whole(arrays.nextOnes)),
    );
  });
}

function checkPass(f: FunctionBuilder, check: Site, arrays: Arrays, kept: Local<'v128'>, scale: number): Statement[] {
  const { ratio, nextZeros, nextOnes, messages, factors, products } = arrays;
  const [x, a, product] = [f.borrow('v128'), f.borrow('v128'), f.borrow('v128')];
  const more = f64x2.add(bothDoubles(scale), x);
  const less = f64x2.sub(bothDoubles(scale), x);
  const multiply = (bit: Place, next: number, factor: V128) => {
    const multiplied = f64x2.mul(at(bit, next), factor);
    return put(bit, next, scale > 1 ? multiplied : f64x2.pmax(multiplied, bothDoubles(least)));
  };
  // Of two bits or more, no product of factors comes as near to 1 as the cut.
  const cut = (value: V128) =>
    check.weight !== null && check.weight > 1 ? value : within(value, largestProduct * scale);
  const code = [
    product.set(bothDoubles(1)),
    check.eachNeighbour((bit, edge, slot) => [
      x.set(v128.and(at(edge, messages), kept)),
      a.set(f64x2.mul(at(bit, ratio), less)),
      x.set(more),
      x.set(within(f64x2.div(f64x2.sub(a, x), f64x2.add(a, x)), largestFactor)),
      put(slot, factors, x),
      put(slot, products, product),
      product.set(f64x2.mul(product, x)),
    ]),
    product.set(bothDoubles(scale)),
    check.eachNeighbourBackwards((bit, edge, slot) => [
      x.set(cut(f64x2.mul(at(slot, products), product))),
      put(edge, messages, x),
      product.set(f64x2.mul(product, at(slot, factors))),
      multiply(bit, nextZeros, more),
      multiply(bit, nextOnes, less),
    ]),
  ];
  f.giveBack(x, a, product);
  return [sequence(...code)];
}
