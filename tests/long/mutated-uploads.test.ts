import { expect, test } from 'vitest';
import { readMutated } from '../models/mutated-uploads.ts';

test('a million damaged files: no crash, no answer over 100 ms, no growth of memory', () => {
  const rounds = 20;
  const residentMb: number[] = [];
  let slowest = { slowestMs: 0, slowest: '' };
  let read = 0;
  for (let round = 0; round < rounds; round++) {
    const outcome = readMutated(`long ${round}`, 50_000);
    expect(outcome.crashes).toEqual([]);
    if (outcome.slowestMs > slowest.slowestMs) slowest = outcome;
    read += outcome.read;
    residentMb.push(process.memoryUsage.rss() / 1e6);
  }
  console.log(
    `${read} of a million still read; slowest ${slowest.slowestMs.toFixed(0)} ms; MB a round: ${residentMb.map((mb) => mb.toFixed(0)).join(' ')}`,
  );
  expect(slowest.slowestMs, slowest.slowest).toBeLessThan(100);
  // Memory of the last rounds against that after the engine has warmed up.
  expect(residentMb.at(-1)! - residentMb[4]!).toBeLessThan(60);
});
