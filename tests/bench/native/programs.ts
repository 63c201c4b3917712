import { execFileSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { SparseMatrix } from '../../../src/core/codes/sparse-matrix.ts';

/** What a native program reports of its run. */
export interface NativeRun {
  frames: number;
  seconds: number;
  frameErrors: number;
  iterations: number;
}

const folder = mkdtempSync(join(tmpdir(), 'kernels-'));
const source = (name: string) => fileURLToPath(new URL(name, import.meta.url));

/** Compiles one of the programs here; null when there is no C++ compiler. */
export function compileNative(name: 'textbook' | 'avx2', defines: Record<string, number> = {}): string | null {
  const flags = Object.entries(defines).map(([key, value]) => `-D${key}=${value}`);
  const program = join(folder, [name, ...Object.values(defines)].join('-'));
  // With AVX-512 left on, the compiler would merge the 256-bit operations three to one.
  const machine = name === 'avx2' ? ['-march=native', '-mno-avx512f'] : ['-march=native'];
  try {
    execFileSync('g++', ['-O3', ...machine, '-std=c++17', '-w', ...flags, '-o', program, source(`./${name}.cpp`)], {
      stdio: 'pipe',
    });
    return program;
  } catch {
    return null;
  }
}

/** The matrix as the programs read it. */
export function writeCode(name: string, H: SparseMatrix): string {
  const path = join(folder, `${name}.code`);
  writeFileSync(path, new Uint8Array(Int32Array.from([H.cols, H.rows, ...H.rowStart, ...H.colIndex]).buffer));
  return path;
}

export function runNative(program: string, args: readonly (string | number)[]): NativeRun {
  return JSON.parse(execFileSync(program, args.map(String), { encoding: 'utf8' })) as NativeRun;
}
