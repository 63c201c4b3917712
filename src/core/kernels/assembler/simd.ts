/** 128-bit instructions (Core Specification 2.0, §5.4.9): opcode prefix 0xfd, then the number below. */

import { type Expr, expression } from './code.ts';
import { unsignedLeb } from './leb128.ts';
import { loader, storer } from './memory-access.ts';
import { type Int32, i32 } from './numeric.ts';

export type V128 = Expr<'v128'>;

const op = (opcode: number): number[] => [0xfd, ...unsignedLeb(opcode)];
const unary = (opcode: number) => (a: V128) => expression('v128', a.code, ...op(opcode));
const binary = (opcode: number) => (a: V128, b: V128) => expression('v128', a.code, b.code, ...op(opcode));
const shift = (opcode: number) => (a: V128, bits: Int32) =>
  expression('v128', a.code, i32.of(bits).code, ...op(opcode));
const test = (opcode: number) => (a: V128) => expression('i32', a.code, ...op(opcode));
const splat32 = (opcode: number) => (a: Int32) => expression('v128', i32.of(a).code, ...op(opcode));
const extract32 = (opcode: number) => (a: V128, lane: number) => expression('i32', a.code, ...op(opcode), lane);

export const v128 = {
  /** Sixteen bytes, lane 0 first. */
  ofBytes: (bytes: ArrayLike<number>): V128 => expression('v128', ...op(12), ...Array.from(bytes)),
  zero: expression('v128', ...op(12), ...new Array<number>(16).fill(0)),
  ones: expression('v128', ...op(12), ...new Array<number>(16).fill(255)),
  load: loader({ type: 'v128', opcode: 0, alignment: 4, simd: true }),
  /** The same load promising no alignment. */
  loadUnaligned: loader({ type: 'v128', opcode: 0, alignment: 0, simd: true }),
  load8Splat: loader({ type: 'v128', opcode: 7, alignment: 0, simd: true }),
  load32Splat: loader({ type: 'v128', opcode: 9, alignment: 2, simd: true }),
  store: storer<'v128'>({ type: 'v128', opcode: 11, alignment: 4, simd: true }),
  storeUnaligned: storer<'v128'>({ type: 'v128', opcode: 11, alignment: 0, simd: true }),
  not: unary(77),
  and: binary(78),
  /** a ∧ ¬b. */
  andnot: binary(79),
  or: binary(80),
  xor: binary(81),
  /** Bits of a where the mask is one, of b where it is zero. */
  bitselect: (a: V128, b: V128, mask: V128): V128 => expression('v128', a.code, b.code, mask.code, ...op(82)),
  anyTrue: test(83),
  /** Bytes of a, then of b, by sixteen indices from 0 to 31. */
  shuffle: (a: V128, b: V128, lanes: readonly number[]): V128 =>
    expression('v128', a.code, b.code, ...op(13), ...lanes),
} as const;

export const i8x16 = {
  splat: splat32(15),
  extractS: extract32(21),
  extractU: extract32(22),
  eq: binary(35),
  ltS: binary(37),
  gtS: binary(39),
  geU: binary(44),
  abs: unary(96),
  neg: unary(97),
  popcnt: unary(98),
  allTrue: test(99),
  bitmask: test(100),
  shl: shift(107),
  shrS: shift(108),
  shrU: shift(109),
  add: binary(110),
  addSatS: binary(111),
  addSatU: binary(112),
  sub: binary(113),
  subSatS: binary(114),
  subSatU: binary(115),
  minS: binary(118),
  minU: binary(119),
  maxS: binary(120),
  maxU: binary(121),
} as const;

export const i16x8 = {
  splat: splat32(16),
  bitmask: test(132),
  shl: shift(139),
  shrS: shift(140),
  shrU: shift(141),
  add: binary(142),
  sub: binary(145),
} as const;

export const i32x4 = {
  splat: splat32(17),
  extract: extract32(27),
  eq: binary(55),
  ltS: binary(57),
  gtS: binary(59),
  bitmask: test(164),
  shl: shift(171),
  shrS: shift(172),
  shrU: shift(173),
  add: binary(174),
  sub: binary(177),
  minS: binary(182),
  maxS: binary(184),
} as const;

export const i64x2 = {
  bitmask: test(196),
  shl: shift(203),
  shrS: shift(204),
  eq: binary(214),
  splat: (a: Expr<'i64'>): V128 => expression('v128', a.code, ...op(18)),
  extract: (a: V128, lane: number): Expr<'i64'> => expression('i64', a.code, ...op(29), lane),
} as const;

export const f32x4 = {
  splat: (a: Expr<'f32'>): V128 => expression('v128', a.code, ...op(19)),
  extract: (a: V128, lane: number): Expr<'f32'> => expression('f32', a.code, ...op(31), lane),
  eq: binary(65),
  lt: binary(67),
  gt: binary(68),
  le: binary(69),
  ge: binary(70),
  abs: unary(224),
  neg: unary(225),
  sqrt: unary(227),
  add: binary(228),
  sub: binary(229),
  mul: binary(230),
  div: binary(231),
  min: binary(232),
  max: binary(233),
  /** b < a ? b : a; one machine instruction where min needs several. */
  pmin: binary(234),
  /** a < b ? b : a. */
  pmax: binary(235),
} as const;

export const f64x2 = {
  splat: (a: Expr<'f64'>): V128 => expression('v128', a.code, ...op(20)),
  extract: (a: V128, lane: number): Expr<'f64'> => expression('f64', a.code, ...op(33), lane),
  lt: binary(73),
  gt: binary(74),
  abs: unary(236),
  neg: unary(237),
  add: binary(240),
  sub: binary(241),
  mul: binary(242),
  div: binary(243),
  pmin: binary(246),
  pmax: binary(247),
} as const;
