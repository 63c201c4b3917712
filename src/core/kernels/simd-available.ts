import { i8x16, ModuleBuilder, v128 } from './assembler/index.ts';

let known: boolean | undefined;

/** Whether this engine runs WebAssembly with 128-bit SIMD, found once by validating a module of one instruction. */
export function simdAvailable(): boolean {
  known ??= typeof WebAssembly === 'object' && WebAssembly.validate(probe());
  return known;
}

function probe(): Uint8Array<ArrayBuffer> {
  const m = new ModuleBuilder();
  m.func({ params: [], results: ['i32'] }, (f) => f.emit(i8x16.bitmask(v128.zero)));
  return m.bytes();
}
