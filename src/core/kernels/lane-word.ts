/** How one frame's bit at one position is marked in a kernel's words; the draw of patterns is written against this. */

import { type Expr, type FunctionBuilder, i32, type Statement, sequence } from './assembler/index.ts';

export interface LaneWord {
  /** Sets the locals that the other two use, for the frame in `lane`. */
  prepare(lane: Expr<'i32'>): Statement;
  /** Address of the lane at the vector whose byte offset is given. */
  address(vector: Expr<'i32'>): Expr<'i32'>;
  /** Not zero when the position is already marked. */
  isMarked(address: Expr<'i32'>): Expr<'i32'>;
  /** Marks the position, or takes the mark back. */
  toggle(address: Expr<'i32'>): Statement;
}

export type LaneWordOf = (f: FunctionBuilder) => LaneWord;

/** 128 lanes of a bit in the vectors from `base` on. */
export const bitLanes =
  (base: number): LaneWordOf =>
  (f) => {
    const byte = f.local('i32');
    const bit = f.local('i32');
    return {
      prepare: (lane) => sequence(byte.set(i32.shrU(lane, 3)), bit.set(i32.shl(1, i32.and(lane, 7)))),
      address: (vector) => i32.add(vector, byte),
      isMarked: (address) => i32.and(i32.load8U(address, base), bit),
      toggle: (address) => i32.store8(address, i32.xor(i32.load8U(address, base), bit), base),
    };
  };

/** 16 lanes of a signed byte, marked when negative. */
export const byteLanes =
  (base: number): LaneWordOf =>
  (f) => {
    const byte = f.local('i32');
    return {
      prepare: (lane) => byte.set(lane),
      address: (vector) => i32.add(vector, byte),
      isMarked: (address) => i32.ltS(i32.load8S(address, base), 0),
      toggle: (address) => i32.store8(address, i32.sub(0, i32.load8S(address, base)), base),
    };
  };

/** 2 lanes of a double, marked by its sign. */
export const doubleLanes =
  (base: number): LaneWordOf =>
  (f) => {
    const signByte = f.local('i32');
    return {
      prepare: (lane) => signByte.set(i32.add(i32.shl(lane, 3), 7)),
      address: (vector) => i32.add(vector, signByte),
      isMarked: (address) => i32.ltS(i32.load8S(address, base), 0),
      toggle: (address) => i32.store8(address, i32.xor(i32.load8U(address, base), 128), base),
    };
  };
