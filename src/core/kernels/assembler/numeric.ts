/** Scalar instructions (Core Specification 2.0, §5.4.7). Where an operand of an integer instruction is a constant, a plain
 *  number (i32) or bigint (i64) may stand for it. */

import { type Expr, expression, type ValueType } from './code.ts';
import { signedLeb, signedLeb64 } from './leb128.ts';
import { loader, storer } from './memory-access.ts';

export type Int32 = Expr<'i32'> | number;
export type Int64 = Expr<'i64'> | bigint;

const int32 = (value: Int32): Expr<'i32'> =>
  typeof value === 'number' ? expression('i32', 0x41, ...signedLeb(value)) : value;
const int64 = (value: Int64): Expr<'i64'> =>
  typeof value === 'bigint' ? expression('i64', 0x42, ...signedLeb64(value)) : value;

const unary32 = (opcode: number) => (a: Int32) => expression('i32', int32(a).code, opcode);
const binary32 = (opcode: number) => (a: Int32, b: Int32) => expression('i32', int32(a).code, int32(b).code, opcode);
const unary64 = (opcode: number) => (a: Int64) => expression('i64', int64(a).code, opcode);
const binary64 = (opcode: number) => (a: Int64, b: Int64) => expression('i64', int64(a).code, int64(b).code, opcode);
const compare64 = (opcode: number) => (a: Int64, b: Int64) => expression('i32', int64(a).code, int64(b).code, opcode);
const convert =
  <A extends ValueType, B extends ValueType>(to: B, opcode: number) =>
  (a: Expr<A>) =>
    expression(to, a.code, opcode);

export const i32 = {
  /** A constant, or the expression itself. */
  of: int32,
  eqz: unary32(0x45),
  eq: binary32(0x46),
  ne: binary32(0x47),
  ltS: binary32(0x48),
  ltU: binary32(0x49),
  gtS: binary32(0x4a),
  gtU: binary32(0x4b),
  leS: binary32(0x4c),
  leU: binary32(0x4d),
  geS: binary32(0x4e),
  geU: binary32(0x4f),
  clz: unary32(0x67),
  ctz: unary32(0x68),
  popcnt: unary32(0x69),
  add: binary32(0x6a),
  sub: binary32(0x6b),
  mul: binary32(0x6c),
  divS: binary32(0x6d),
  divU: binary32(0x6e),
  remU: binary32(0x70),
  and: binary32(0x71),
  or: binary32(0x72),
  xor: binary32(0x73),
  shl: binary32(0x74),
  shrS: binary32(0x75),
  shrU: binary32(0x76),
  rotl: binary32(0x77),
  /** The low half of an i64. */
  wrap: convert<'i64', 'i32'>('i32', 0xa7),
  load: loader({ type: 'i32', opcode: 0x28, alignment: 2 }),
  load8S: loader({ type: 'i32', opcode: 0x2c, alignment: 0 }),
  load8U: loader({ type: 'i32', opcode: 0x2d, alignment: 0 }),
  load16U: loader({ type: 'i32', opcode: 0x2f, alignment: 1 }),
  store: storer<'i32'>({ type: 'i32', opcode: 0x36, alignment: 2 }),
  store8: storer<'i32'>({ type: 'i32', opcode: 0x3a, alignment: 0 }),
  store16: storer<'i32'>({ type: 'i32', opcode: 0x3b, alignment: 1 }),
} as const;

export const i64 = {
  of: int64,
  eqz: (a: Int64) => expression('i32', int64(a).code, 0x50),
  eq: compare64(0x51),
  ne: compare64(0x52),
  ltS: compare64(0x53),
  ltU: compare64(0x54),
  gtU: compare64(0x56),
  geU: compare64(0x5a),
  clz: unary64(0x79),
  ctz: unary64(0x7a),
  popcnt: unary64(0x7b),
  add: binary64(0x7c),
  sub: binary64(0x7d),
  mul: binary64(0x7e),
  and: binary64(0x83),
  or: binary64(0x84),
  xor: binary64(0x85),
  shl: binary64(0x86),
  shrU: binary64(0x88),
  rotl: binary64(0x89),
  extendU: convert<'i32', 'i64'>('i64', 0xad),
  extendS: convert<'i32', 'i64'>('i64', 0xac),
  load: loader({ type: 'i64', opcode: 0x29, alignment: 3 }),
  store: storer<'i64'>({ type: 'i64', opcode: 0x37, alignment: 3 }),
} as const;

const floatBytes = (value: number): number[] => [...new Uint8Array(new Float32Array([value]).buffer)];

export const f32 = {
  of: (value: number) => expression('f32', 0x43, ...floatBytes(value)),
  lt: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('i32', a.code, b.code, 0x5d),
  gt: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('i32', a.code, b.code, 0x5e),
  add: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('f32', a.code, b.code, 0x92),
  sub: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('f32', a.code, b.code, 0x93),
  mul: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('f32', a.code, b.code, 0x94),
  div: (a: Expr<'f32'>, b: Expr<'f32'>) => expression('f32', a.code, b.code, 0x95),
  load: loader({ type: 'f32', opcode: 0x2a, alignment: 2 }),
  store: storer<'f32'>({ type: 'f32', opcode: 0x38, alignment: 2 }),
} as const;

const doubleBytes = (value: number): number[] => [...new Uint8Array(new Float64Array([value]).buffer)];

export const f64 = {
  of: (value: number) => expression('f64', 0x44, ...doubleBytes(value)),
  load: loader({ type: 'f64', opcode: 0x2b, alignment: 3 }),
  store: storer<'f64'>({ type: 'f64', opcode: 0x39, alignment: 3 }),
} as const;
