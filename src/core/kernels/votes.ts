/** What the bit-sliced kernels do at a row or a column: sums of neighbours as planes, and thresholds of every kind. */

import { atLeast, atLeastPlanes, increment, type Planes, sumOfBits } from './adder-network.ts';
import {
  type Expr,
  type FunctionBuilder,
  i32,
  i32x4,
  type Local,
  type Statement,
  type V128,
  v128,
} from './assembler/index.ts';
import type { Place, Site } from './graph-walk.ts';

/** The vector at a place of the array that starts at `array`. */
export const at = (place: Place, array: number): V128 => v128.load(place.address, array + place.offset);
export const put = (place: Place, array: number, value: V128): Statement =>
  v128.store(place.address, value, array + place.offset);

/** Digits that hold every number up to `largest`. */
export const digitsFor = (largest: number): number => Math.max(1, 32 - Math.clz32(largest));

/** Adds up one bit a neighbour, and `extra` where given.
 *  @param largest The largest sum that can come up in the mixed rest. */
export function countNeighbours(
  f: FunctionBuilder,
  site: Site,
  read: (neighbour: Place, edge: Place) => V128,
  { extra, largest }: { extra?: V128; largest: number },
): Planes {
  if (site.weight !== null) {
    const words = site.neighbours.map(({ neighbour, edge }) => read(neighbour, edge));
    return sumOfBits(f, extra ? [...words, extra] : words);
  }
  const counter = Array.from({ length: digitsFor(largest) }, () => f.borrow('v128'));
  return {
    code: [
      ...counter.map((digit) => digit.set(v128.zero)),
      ...(extra ? increment(f, counter, extra) : []),
      site.eachNeighbour((neighbour, edge) => increment(f, counter, read(neighbour, edge))),
    ],
    planes: counter,
  };
}

/** Sum modulo 2 over the neighbours of a row, into `sum`. */
export function parityInto(site: Site, sum: Local<'v128'>, read: (neighbour: Place) => V128): Statement[] {
  if (site.weight === null)
    return [sum.set(v128.zero), site.eachNeighbour((neighbour) => [sum.set(v128.xor(sum, read(neighbour)))])];
  const words = site.neighbours.map(({ neighbour }) => read(neighbour));
  return [sum.set(words.length === 0 ? v128.zero : words.reduce((a, b) => v128.xor(a, b)))];
}

/** The planes of a number known at run time, the same in all lanes. */
export const splatPlanes = (value: Expr<'i32'>, digits: number): V128[] =>
  Array.from({ length: digits }, (_, k) => i32x4.splat(i32.sub(0, i32.and(i32.shrU(value, k), 1))));

/** Frames whose count reaches a threshold that is a constant or is read from the column's record. */
export const reaches = (planes: readonly V128[], threshold: number | Expr<'i32'>): V128 =>
  typeof threshold === 'number'
    ? atLeast(planes, threshold)
    : atLeastPlanes(planes, splatPlanes(threshold, planes.length));
