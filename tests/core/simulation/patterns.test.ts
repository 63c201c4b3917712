import { describe, expect, it } from 'vitest';
import { matrixFromRows } from '../../../src/core/codes/sparse-matrix.ts';
import { LimitError, ParamError } from '../../../src/core/errors.ts';
import { createPatternSource } from '../../../src/core/simulation/patterns.ts';
import { randomFrom } from '../../../src/core/simulation/random.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { bscWeightTable, weightOf } from '../../../src/core/simulation/weight-table.ts';

const wordOf = (n: number, channel: RunSpec['channel'], seed = 's') => ({
  H: matrixFromRows(n, [[0, n - 1]]),
  channel,
  seed,
});

describe('the table of weights', () => {
  // floor(2^64·P(W ≤ w)) with Python's fractions, from the exact value of the floating-point p.
  it.each([
    [21, 0.05, 0, 6282253161463174295n],
    [21, 0.05, 1, 13225796129396156817n],
    [21, 0.05, 4, 18386970726982538507n],
    [21, 0.05, 7, 18446662698676542106n],
    [273, 1e-6, 0, 18441708797406278592n],
    [273, 1e-6, 3, 18446744073709547440n],
    [273, 0.012, 1, 2948667793965629118n],
    [273, 0.012, 20, 18446744073106543260n],
    [1057, 0.5, 400, 23207n],
    [1057, 0.5, 528, 9223372036854775808n],
    [1057, 0.5, 600, 18446659444125419717n],
    [40, 0.9, 0, 0n],
    [40, 0.9, 20, 3452968427n],
    [40, 0.9, 39, 18174084908905448175n],
  ])('of %i bits at p = %d has the exact entry at weight %i', (n, p, w, entry) => {
    const table = bscWeightTable(n, p);
    expect((BigInt(table.hi[w]!) << 32n) | BigInt(table.lo[w]!)).toBe(entry);
  });

  it('ends where the rest has a probability below 2^-64', () => {
    const table = bscWeightTable(273, 1e-6);
    expect(table.hi.length).toBeLessThan(6);
    expect(weightOf(table, 0xffffffff, 0xffffffff)).toBe(table.hi.length);
  });

  it('of 70 000 bits at p = 1/2 has its median at half the length', () => {
    const table = bscWeightTable(70_000, 0.5);
    expect(weightOf(table, 0x80000000, 0)).toBe(35_000);
  });

  it('at p = 1 is always the whole word', () => {
    expect(weightOf(bscWeightTable(9, 1), 0, 0)).toBe(9);
  });

  it.each([1e-6, 1e-4, 0.01, 0.1, 0.5])('gives weights by the exact law at p = %d (chi-square)', (p) => {
    const n = 273;
    const draws = 200_000;
    const table = bscWeightTable(n, p);
    const random = randomFrom([1, 2, 3, Math.round(p * 1e6)]);
    const counts = new Float64Array(n + 1);
    for (let i = 0; i < draws; i++) counts[weightOf(table, random.next32(), random.next32())]!++;
    const { statistic, cells } = chiSquare(counts, binomialLaw(n, p), draws);
    expect(statistic).toBeLessThan(cells - 1 + 5 * Math.sqrt(2 * cells));
  });
});

describe('a pattern', () => {
  it('is a set of distinct positions below n', async () => {
    const source = await createPatternSource(wordOf(73, { kind: 'bsc', p: 0.5 }), 0);
    const into = new Uint32Array(73);
    for (let frame = 0; frame < 500; frame++) {
      const positions = into.subarray(0, source.next(into));
      expect(new Set(positions).size).toBe(positions.length);
      for (const position of positions) expect(position).toBeLessThan(73);
    }
  });

  it('hits every position with probability p', async () => {
    const [n, p, frames] = [21, 0.2, 40_000];
    const source = await createPatternSource(wordOf(n, { kind: 'bsc', p }), 3);
    const into = new Uint32Array(n);
    const hits = new Float64Array(n);
    for (let frame = 0; frame < frames; frame++) for (let i = source.next(into) - 1; i >= 0; i--) hits[into[i]!]!++;
    const deviation = Math.sqrt(frames * p * (1 - p));
    for (const count of hits) expect(Math.abs(count - frames * p)).toBeLessThan(4.5 * deviation);
  });

  it.each([0, 1, 4, 5, 8, 9])('of a stratum has exactly the weight %i', async (weight) => {
    const source = await createPatternSource(wordOf(9, { kind: 'stratum', weight }), 0);
    const into = new Uint32Array(9);
    for (let frame = 0; frame < 50; frame++) expect(source.next(into)).toBe(weight);
  });

  it.each([2, 4])('of a stratum of weight %i in 6 bits is uniform over all fifteen (chi-square)', async (weight) => {
    const source = await createPatternSource(wordOf(6, { kind: 'stratum', weight }, `w${weight}`), 0);
    const into = new Uint32Array(6);
    const counts = new Map<number, number>();
    const frames = 30_000;
    for (let frame = 0; frame < frames; frame++) {
      source.next(into);
      const mask = into.subarray(0, weight).reduce((bits, j) => bits | (1 << j), 0);
      counts.set(mask, (counts.get(mask) ?? 0) + 1);
    }
    expect(counts.size).toBe(15);
    const expected = frames / 15;
    const statistic = [...counts.values()].reduce((sum, c) => sum + (c - expected) ** 2 / expected, 0);
    expect(statistic).toBeLessThan(14 + 5 * Math.sqrt(28));
  });

  it('repeats for the same seed and shard, and for no other', async () => {
    const first = async (seed: string, index: number) => {
      const source = await createPatternSource(wordOf(273, { kind: 'bsc', p: 0.1 }, seed), index);
      const into = new Uint32Array(273);
      return into.subarray(0, source.next(into)).join();
    };
    expect(await first('x', 0)).toBe(await first('x', 0));
    expect(await first('x', 0)).not.toBe(await first('x', 1));
    expect(await first('x', 0)).not.toBe(await first('y', 0));
  });

  it('heavier than the word is refused, as is noise that is no pattern and a word past the limit', async () => {
    await expect(createPatternSource(wordOf(9, { kind: 'stratum', weight: 10 }), 0)).rejects.toThrow(ParamError);
    await expect(createPatternSource(wordOf(9, { kind: 'awgn', ebn0Db: 3 }), 0)).rejects.toThrow(ParamError);
    await expect(createPatternSource(wordOf(2 ** 21 + 1, { kind: 'bsc', p: 0.1 }), 0)).rejects.toThrow(LimitError);
  });
});

function binomialLaw(n: number, p: number): number[] {
  const law: number[] = [];
  let logTerm = n * Math.log1p(-p);
  for (let w = 0; w <= n; w++) {
    law.push(Math.exp(logTerm));
    logTerm += Math.log(((n - w) / (w + 1)) * (p / (1 - p)));
  }
  return law;
}

/** Pearson's statistic over cells joined until each expects at least 10. */
function chiSquare(counts: ArrayLike<number>, law: readonly number[], draws: number) {
  let statistic = 0;
  let cells = 0;
  let seen = 0;
  let expected = 0;
  let expectedLeft = draws;
  for (let w = 0; w < law.length; w++) {
    seen += counts[w]!;
    expected += law[w]! * draws;
    if (expected < 10 || expectedLeft - expected < 10) continue;
    statistic += (seen - expected) ** 2 / expected;
    expectedLeft -= expected;
    cells += 1;
    seen = 0;
    expected = 0;
  }
  if (expected > 0) statistic += (seen - expected) ** 2 / Math.max(expected, 1e-300);
  return { statistic: cells === 0 ? 0 : statistic, cells: cells + 1 };
}
