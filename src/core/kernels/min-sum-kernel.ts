/** Min-sum in 8-bit fixed point, 16 frames a word, layered or flooding. No sum saturates, since c + max d_j·rMax ≤ 127
 *  is asked of every spec; so the order of additions does not matter and the tally equals the reference's. */

import type { MinSumSettings } from '../decoders/settings.ts';
import {
  type FunctionRef,
  i8x16,
  i16x8,
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
import { byteLanes } from './lane-word.ts';
import { control, MemoryLayout, vectorBytes } from './memory-layout.ts';
import { allBytes, emitSoftSyndrome, emitSoftWeigh, laneMask } from './soft-words.ts';
import { at, put } from './votes.ts';

const nothing = { params: [], results: [] } as const;
const lanes = 16;

interface Arrays {
  channel: number;
  /** Twice over for a circulant. */
  posteriors: number;
  /** Flooding: the next posteriors as they are added up, from the channel on; twice over for a circulant. */
  sums: number;
  /** Words whose sign is the decision. */
  decisions: number;
  /** Messages of the checks, an edge each; the bits' messages of the row in hand while it is worked on. */
  messages: number;
}

/** @param plan For the layered schedule made with its rows in order. */
export function minSumKernel(plan: GraphPlan, settings: MinSumSettings): KernelImage {
  const { H } = plan;
  const { cap } = settings;
  const layered = settings.schedule === 'layered';
  const layout = new MemoryLayout();
  const places = reserveConductor(layout, H.cols, cap);
  const arrays: Arrays = {
    channel: layout.reserve(vectorBytes * H.cols),
    posteriors: layout.reserve(arrayBytes(plan, H.cols)),
    sums: layered ? 0 : layout.reserve(arrayBytes(plan, H.cols)),
    decisions: layout.reserve(vectorBytes * H.cols),
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
    word: byteLanes(arrays.channel),
    clear: emitClear(m, H.cols, arrays, settings.c),
    filled: emitFilled(m, plan, arrays, layered),
    syndrome: emitSoftSyndrome(m, layout, plan, rows, lanes, arrays.decisions),
    iterate: emitIterate(m, plan, rows, arrays, settings),
    beforeWeighing: null,
    weigh: emitSoftWeigh(m, H.cols, lanes, arrays.decisions),
  });
  const stepNs = 2.5 * H.colIndex.length;
  return finishKernel(m, layout, { n: H.cols, cap, places, word: arrays.channel, stepNs, tables: [rows, positions] });
}

/** The channel value +c in the lanes that hold no frame. */
function emitClear(m: ModuleBuilder, n: number, { channel }: Arrays, c: number): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const active = f.local('v128');
    f.emit(
      active.set(laneMask(lanes, control.active)),
      eachVector(i, n, [v128.store(i, v128.bitselect(v128.load(i, channel), allBytes(c), active), channel)]),
    );
  });
}

/** Posteriors of the fresh lanes begin as the channel values. */
function emitFilled(m: ModuleBuilder, plan: GraphPlan, arrays: Arrays, layered: boolean): FunctionRef {
  return m.func(nothing, (f) => {
    const i = f.local('i32');
    const fresh = f.local('v128');
    const posterior = f.local('v128');
    f.emit(
      fresh.set(laneMask(lanes, control.fresh)),
      eachVector(i, plan.H.cols, [
        posterior.set(v128.bitselect(v128.load(i, arrays.channel), v128.load(i, arrays.posteriors), fresh)),
        ...storePosterior(plan, i, posterior, arrays, layered),
      ]),
    );
  });
}

/** Stores a posterior and its decision: negative is 1, and 0 keeps the received bit, which a −1 where that is 1 brings
 *  about. */
function storePosterior(
  plan: GraphPlan,
  i: Local<'i32'>,
  posterior: Local<'v128'>,
  { channel, posteriors, sums, decisions }: Arrays,
  layered: boolean,
): Statement[] {
  const received = i8x16.ltS(v128.load(i, channel), v128.zero);
  const code = [v128.store(i, posterior, posteriors), v128.store(i, i8x16.add(posterior, received), decisions)];
  if (layered) return code;
  code.push(v128.store(i, v128.load(i, channel), sums));
  if (!plan.circulant) return code;
  const second = vectorBytes * plan.H.cols;
  return [...code, v128.store(i, posterior, posteriors + second), v128.store(i, v128.zero, sums + second)];
}

/** The magnitude a check sends, from the least magnitude of the others; 255 stands for none. */
function scaled(magnitude: V128, { scale, rMax }: MinSumSettings): V128 {
  // Bytes have no shift of their own: shift pairs and drop what crossed over.
  const shifted = (value: V128, bits: number) => v128.and(i16x8.shrU(value, bits), allBytes(255 >> bits));
  const whole = () => {
    switch (scale) {
      case '1/8':
        return shifted(magnitude, 3);
      case '1/4':
        return shifted(magnitude, 2);
      case '1/2':
        return shifted(magnitude, 1);
      case '3/4':
        // ⌊3m/4⌋ = m − ⌈m/4⌉.
        return i8x16.sub(magnitude, shifted(i8x16.addSatU(magnitude, allBytes(3)), 2));
      case '1':
        return magnitude;
      case 'offset-1':
        return i8x16.subSatU(magnitude, allBytes(1));
    }
  };
  return i8x16.minU(whole(), allBytes(rMax));
}

function emitIterate(
  m: ModuleBuilder,
  plan: GraphPlan,
  rows: SideTables,
  arrays: Arrays,
  settings: MinSumSettings,
): FunctionRef {
  const { posteriors, sums, messages } = arrays;
  const layered = settings.schedule === 'layered';
  const bytes = vectorBytes * plan.H.cols;
  // Layered on a circulant: check i meets its bits at i + d, unwrapped, so that bit j is met at j by the checks up to j
  // and at j + n by those after. Its posterior moves from the first copy to the second after check j.
  const latest = plan.circulant ? posteriors + bytes : posteriors;
  return m.func(nothing, (f) => {
    const kept = f.local('v128');
    const message = f.local('v128');
    const magnitude = f.local('v128');
    const least = f.local('v128');
    const second = f.local('v128');
    const signs = f.local('v128');
    const usual = f.local('v128');
    const change = f.local('v128');
    const negative = f.local('v128');
    f.emit(
      // Fresh lanes have had no message yet.
      kept.set(v128.not(laneMask(lanes, control.fresh))),
      walk(f, rows, (check) => [
        least.set(v128.ones),
        second.set(v128.ones),
        signs.set(v128.zero),
        check.eachNeighbour((bit, edge) => [
          message.set(i8x16.sub(at(bit, posteriors), v128.and(at(edge, messages), kept))),
          put(edge, messages, message),
          magnitude.set(i8x16.abs(message)),
          second.set(i8x16.minU(second, i8x16.maxU(least, magnitude))),
          least.set(i8x16.minU(least, magnitude)),
          signs.set(v128.xor(signs, message)),
        ]),
        usual.set(scaled(least, settings)),
        // What turns the magnitude for the others into that for the bit with the least.
        change.set(v128.xor(usual, scaled(second, settings))),
        check.eachNeighbour((bit, edge) => [
          message.set(at(edge, messages)),
          negative.set(i8x16.ltS(v128.xor(signs, message), v128.zero)),
          magnitude.set(v128.xor(usual, v128.and(change, i8x16.eq(i8x16.abs(message), least)))),
          magnitude.set(i8x16.sub(v128.xor(magnitude, negative), negative)),
          put(edge, messages, magnitude),
          layered
            ? put(bit, posteriors, i8x16.add(message, magnitude))
            : put(bit, sums, i8x16.add(at(bit, sums), magnitude)),
        ]),
        ...(layered && plan.circulant ? [put(check.own, latest, at(check.own, posteriors))] : []),
      ]),
    );
    const i = f.local('i32');
    const sum = v128.load(i, layered ? latest : sums);
    const wrapped = v128.load(i, sums + bytes);
    f.emit(
      eachVector(i, plan.H.cols, [
        message.set(!layered && plan.circulant ? i8x16.add(sum, wrapped) : sum),
        ...storePosterior(plan, i, message, arrays, layered),
      ]),
    );
  });
}
