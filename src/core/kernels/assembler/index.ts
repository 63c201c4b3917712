/** A small assembler for WebAssembly with 128-bit SIMD: typed expressions in, module bytes out.
 *
 *  ```ts
 *  const m = new ModuleBuilder();
 *  m.func({ params: ['i32', 'i32'], results: ['i32'] }, (f) => {
 *    f.emit(i32.add(f.param(0, 'i32'), f.param(1, 'i32')));
 *  }, 'add');
 *  const { instance } = await WebAssembly.instantiate(m.bytes());
 *  ```
 *
 *  Expressions carry their type, so that TypeScript refuses an i64 where an i32 belongs; what remains (stack discipline,
 *  label reach) is the engine's validator's business, and the tests validate every module. */
export { type Expr, type Label, type Statement, sequence, statement, type ValueType } from './code.ts';
export { block, branch, branchIf, countLoop, drop, loop, select, when, whileLoop } from './control.ts';
export {
  type FunctionBuilder,
  FunctionRef,
  type Global,
  type Local,
  type Signature,
  type Value,
} from './function-builder.ts';
export { base, memoryCopy, memoryFill } from './memory-access.ts';
export { ModuleBuilder } from './module-builder.ts';
export { f32, f64, type Int32, type Int64, i32, i64 } from './numeric.ts';
export { f32x4, f64x2, i8x16, i16x8, i32x4, i64x2, type V128, v128 } from './simd.ts';
