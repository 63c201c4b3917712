import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { matrixFromRows, type SparseMatrix } from '../../../src/core/codes/sparse-matrix.ts';
import { begin, CompiledKernel } from '../../../src/core/kernels/compiled-kernel.ts';
import { emitterFor } from '../../../src/core/kernels/kernel-for.ts';
import { vectorBytes } from '../../../src/core/kernels/memory-layout.ts';
import { createPatternSource } from '../../../src/core/simulation/patterns.ts';
import { streamState } from '../../../src/core/simulation/random.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { bscWeightTable } from '../../../src/core/simulation/weight-table.ts';

const wordOf = (n: number): SparseMatrix => matrixFromRows(n, [Array.from({ length: n }, (_, j) => j)]);

/** The patterns that one filling of the 128 lanes draws, in lane order; errorless frames take no lane. */
async function drawnByKernel(spec: Pick<RunSpec, 'H' | 'seed'>, index: number, weights: number | { p: number }) {
  const n = spec.H.cols;
  const image = emitterFor({ kind: 'majority-logic' }, spec.H)!();
  const kernel = await CompiledKernel.compile(image);
  const instance = await kernel.take();
  const law = typeof weights === 'number' ? weights : bscWeightTable(n, weights.p);
  begin(instance, image, { frames: 400, random: await streamState(spec.seed, index), weights: law, bias: 0 });
  instance.refill();
  const bytes = new Uint8Array(instance.memory.buffer, image.word, vectorBytes * n);
  return Array.from({ length: 128 }, (_, lane) => {
    const pattern: number[] = [];
    for (let j = 0; j < n; j++) if ((bytes[vectorBytes * j + (lane >> 3)]! >> (lane & 7)) & 1) pattern.push(j);
    return pattern;
  });
}

async function drawnByTwin(spec: Pick<RunSpec, 'H' | 'seed'>, index: number, channel: RunSpec['channel']) {
  const source = await createPatternSource({ ...spec, channel }, index);
  const into = new Uint32Array(spec.H.cols);
  const patterns: number[][] = [];
  for (let frame = 0; frame < 400 && patterns.length < 128; frame++) {
    const weight = source.next(into);
    if (weight > 0) patterns.push([...into.subarray(0, weight)].sort((a, b) => a - b));
  }
  return [...patterns, ...Array.from({ length: 128 - patterns.length }, () => [])];
}

const cases = fc.record({ n: fc.integer({ min: 1, max: 300 }), seed: fc.string(), index: fc.nat(10 ** 9) });

describe('patterns drawn in WebAssembly', () => {
  test('are those of the TypeScript twin, frame by frame, at every p', async () => {
    const probability = fc.oneof(fc.constantFrom(1e-6, 0.5), fc.double({ min: 1e-6, max: 0.5, noNaN: true }));
    await fc.assert(
      fc.asyncProperty(cases, probability, async ({ n, seed, index }, p) => {
        const spec = { H: wordOf(n), seed };
        expect(await drawnByKernel(spec, index, { p })).toEqual(await drawnByTwin(spec, index, { kind: 'bsc', p }));
      }),
      { numRuns: 40 },
    );
  });

  test('of a stated weight are the twin’s too, from none to all positions', async () => {
    await fc.assert(
      fc.asyncProperty(cases, fc.double({ min: 0, max: 1, noNaN: true }), async ({ n, seed, index }, part) => {
        const spec = { H: wordOf(n), seed };
        const weight = Math.round(part * n);
        const twin = await drawnByTwin(spec, index, { kind: 'stratum', weight });
        expect(await drawnByKernel(spec, index, weight)).toEqual(twin);
      }),
      { numRuns: 40 },
    );
  });

  test('are equal for a word of 65,793 bits', async () => {
    const spec = { H: wordOf(65_793), seed: 'long word' };
    const twin = await drawnByTwin(spec, 7, { kind: 'bsc', p: 1e-3 });
    expect(await drawnByKernel(spec, 7, { p: 1e-3 })).toEqual(twin);
  });
});
