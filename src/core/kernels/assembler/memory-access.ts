/** Loads and stores. An address is an i32 expression plus a constant offset that costs nothing at run time, which is how
 *  the kernels put table places into the instruction itself. */

import { type Code, type Expr, expression, type Statement, statement, type ValueType } from './code.ts';
import { unsignedLeb } from './leb128.ts';

const opcodeBytes = (opcode: number, simd: boolean): number[] => (simd ? [0xfd, ...unsignedLeb(opcode)] : [opcode]);

interface Access<T extends ValueType> {
  type: T;
  opcode: number;
  /** Logarithm to base 2 of the bytes accessed: the alignment promised to the engine, a hint only. */
  alignment: number;
  simd?: boolean;
}

const memarg = (alignment: number, offset: number): Code => [alignment, ...unsignedLeb(offset)];

/** An emitter of loads: `(address, offset) => value`. */
export function loader<T extends ValueType>({ type, opcode, alignment, simd = false }: Access<T>) {
  return (address: Expr<'i32'>, offset = 0): Expr<T> =>
    expression(type, address.code, ...opcodeBytes(opcode, simd), memarg(alignment, offset));
}

/** An emitter of stores: `(address, value, offset) => statement`. */
export function storer<T extends ValueType>({ opcode, alignment, simd = false }: Access<T>) {
  return (address: Expr<'i32'>, value: Expr<T>, offset = 0): Statement =>
    statement(address.code, value.code, ...opcodeBytes(opcode, simd), memarg(alignment, offset));
}

const ZERO: Expr<'i32'> = expression('i32', 0x41, 0);

/** The constant address 0, for places given by offset alone. */
export const base = ZERO;

/** memory.fill and memory.copy (bulk memory operations, Core Specification 2.0, §4.4.7). */
export const memoryFill = (to: Expr<'i32'>, byte: Expr<'i32'>, bytes: Expr<'i32'>): Statement =>
  statement(to.code, byte.code, bytes.code, 0xfc, 11, 0);
export const memoryCopy = (to: Expr<'i32'>, from: Expr<'i32'>, bytes: Expr<'i32'>): Statement =>
  statement(to.code, from.code, bytes.code, 0xfc, 10, 0, 0);
