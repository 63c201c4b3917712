import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fastShard } from '../../src/core/kernels/index.ts';
import { laneShard } from '../../src/core/simulation/lane-shard.ts';
import { drive, runShard } from '../../src/core/simulation/shard.ts';
import { cap, type DecoderFor, regularColumns, runs } from '../core/kernels/arbitrary-runs.ts';
import { exactDecoders } from '../core/kernels/decoder-arbitraries.ts';

// The comparison of tests/core/kernels, thousands of times over; on a slow machine as often as the time allows, so that
// all kernels have their turn within an hour. How often is printed.
const mostRuns = 3000;
const fewestRuns = 300;
const kernels = Object.keys(exactDecoders).length + 2;
const minutesEach = 54 / kernels;

const finiteAlphabets: DecoderFor = () => fc.record({ kind: fc.constant('finite-alphabet' as const), iterations: cap });

async function compare(name: string, arbitrary: ReturnType<typeof runs>) {
  const result = await fc.check(
    fc.asyncProperty(arbitrary, async ({ spec, index }) => {
      const reference = await runShard(spec, index, 'reference');
      expect(await fastShard(spec, index)).toEqual(reference);
      const lanes = laneShard(spec, index);
      if (lanes) expect(await drive(lanes, {})).toEqual(reference);
    }),
    { numRuns: mostRuns, interruptAfterTimeLimit: minutesEach * 60_000, markInterruptAsFailure: false },
  );
  console.log(`${name}: ${result.numRuns} shards compared`);
  expect(result.failed, fc.defaultReportMessage(result)).toBe(false);
  expect(result.numRuns).toBeGreaterThanOrEqual(fewestRuns);
}

describe('over thousands of random matrices, weights, seeds and caps a kernel gives the reference tally for', () => {
  for (const [name, decoders] of Object.entries(exactDecoders)) {
    test(name, async () => {
      await compare(name, runs(decoders, { maxFrames: 700 }));
    });
  }

  test('the finite alphabet', async () => {
    await compare('finite-alphabet', runs(finiteAlphabets, { from: regularColumns(3), maxFrames: 700 }));
  });

  test('peeling', async () => {
    await compare(
      'peeling',
      runs(() => fc.constant({ kind: 'peeling' }), { erasures: true, maxFrames: 700 }),
    );
  });
});
