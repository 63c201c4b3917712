import { describe, expect, it } from 'vitest';
import { channelReading } from '../../src/core/channels/reading.ts';
import { matrixFromRows } from '../../src/core/codes/sparse-matrix.ts';
import { createDecoder } from '../../src/core/decoders/create-decoder.ts';
import type { DecoderSpec } from '../../src/core/decoders/decoder-spec.ts';
import { sumProduct } from '../../src/core/decoders/sum-product.ts';
import { tannerGraph } from '../../src/core/decoders/tanner-graph.ts';
import { enumerateStratum } from '../../src/core/simulation/enumerate-stratum.ts';
import { type Stratum, stratifiedRate } from '../../src/core/simulation/stratified-rate.ts';
import facts from './decoder-facts.json' with { type: 'json' };
import { developed, planarDifferenceSets } from './difference-sets.ts';

const plane2 = developed(7, planarDifferenceSets[2].set);
const plane4 = developed(21, planarDifferenceSets[4].set);
const relative = (value: number, truth: number) => Math.abs(value / truth - 1);

interface ExactCounts {
  F_w: number[];
  B_w: number[];
  undetected_w: number[];
  values?: Record<string, { FER: string; BER: string }>;
}

describe('exact counts of every pattern, one an orbit, meet a C enumeration of all of them', () => {
  it.each<[keyof typeof facts.entries, typeof plane2, DecoderSpec, number]>([
    ['E-exact-7-OSMLD', plane2, { kind: 'majority-logic' }, 7],
    ['E-exact-21-OSMLD', plane4, { kind: 'majority-logic' }, 21],
    ['E-exact-21-GB', plane4, { kind: 'gallager-b' }, 21],
    // All weights of this one are among the long tests.
    ['E-exact-21-SPA-0.05', plane4, { kind: 'sum-product', designP: 0.05 }, 5],
  ])('%s', async (id, H, decoder, heaviest) => {
    const exact = facts.entries[id].value as unknown as ExactCounts;
    const spec = { H, channel: { kind: 'bsc', p: 0.05 } as const, decoder, seed: '', framesPerShard: 1 };
    const strata: Stratum[] = [];
    for (let weight = 0; weight <= heaviest; weight++) {
      const counted = await enumerateStratum(spec, weight);
      expect([counted.frameErrors, counted.bitErrors, counted.undetected]).toEqual([
        exact.F_w[weight],
        exact.B_w[weight],
        exact.undetected_w[weight],
      ]);
      strata.push({ ...counted, weight, grade: 'computed' });
    }
    for (const [p, { FER, BER }] of Object.entries(heaviest === H.cols ? exact.values! : {})) {
      const rate = stratifiedRate(strata, H.cols, Number(p), 0.95);
      expect(relative(rate.estimate, Number(FER))).toBeLessThan(1e-12);
      expect(rate.lower).toBe(rate.upper);
      expect(relative(rate.ber!.estimate, Number(BER))).toBeLessThan(1e-12);
    }
  });
});

describe('strata of perfect codes meet the closed forms', () => {
  it.each(['E-perfect-7-1', 'E-perfect-31-1', 'E-perfect-23-3', 'E-perfect-5-2', 'E-perfect-3-1'] as const)(
    '%s',
    (id) => {
      const { n, t } = facts.entries[id].parameters;
      const { F_w, values } = facts.entries[id].value;
      const strata = F_w.map((failed, weight): Stratum => {
        const patterns = choose(n, weight);
        return { weight, frames: patterns, frameErrors: failed, grade: weight <= t ? 'proved' : 'computed' };
      });
      for (const [p, { FER }] of Object.entries(values))
        expect(relative(stratifiedRate(strata, n, Number(p), 0.95).estimate, Number(FER))).toBeLessThan(1e-11);
    },
  );
});

describe('sum-product on a graph without cycles gives the exact marginals', () => {
  it.each(['E-tree-path', 'E-tree-spider'] as const)('%s', (id) => {
    const { H: rows, y, p } = facts.entries[id].parameters;
    const value = facts.entries[id].value as { llr_final: string[]; hard: number[] };
    const { decoder, received } = decoderOf(matrixFromRows(y.length, rows), y, p, 50);
    const totals = iterate(decoder, received, 12);
    totals.at(-1)!.forEach((total, j) => {
      expect(Math.abs(total - Number(value.llr_final[j]))).toBeLessThan(1e-9);
    });
    expect(totals.at(-1)!.map((total) => (total < 0 ? 1 : 0))).toEqual(value.hard);
  });
});

describe('sum-product on the Fano plane follows the traced totals', () => {
  it.each(['E-trace-fano-1000000', 'E-trace-fano-0100100'] as const)('%s', (id) => {
    const { y, p } = facts.entries[id].parameters;
    const { decoder, received } = decoderOf(plane2, y, p, 50);
    const totals = iterate(decoder, received, 5);
    facts.entries[id].value.forEach((traced, iteration) => {
      // From some 30 on the clipping of messages, which the trace does without, shows.
      traced.forEach((value, j) => {
        if (Math.abs(Number(value)) < 25) expect(Math.abs(totals[iteration]![j]! - Number(value))).toBeLessThan(1e-6);
      });
    });
  });
});

describe('decoded words on PG(2,4) meet the test vectors', () => {
  it.each(facts.entries['E-vec-pg4'].value)('errors at $errors', (vector) => {
    const received = new Uint8Array(21);
    for (const j of vector.errors) received[j] = 1;
    const run = (spec: DecoderSpec) => {
      const { word, iterations, converged } = createDecoder(plane4, spec, { kind: 'bsc', p: 0.05 }).decode(received);
      return { out: Array.from(word).flatMap((bit, j) => (bit ? [j] : [])), iterations, converged };
    };
    expect(run({ kind: 'majority-logic' }).out).toEqual(vector.osmld);
    expect(run({ kind: 'gallager-b' })).toEqual(vector.gallagerB);
    expect(run({ kind: 'sum-product' })).toEqual(vector.spa_p005);
  });
});

function decoderOf(H: typeof plane2, y: readonly number[], p: number, cap: number) {
  const reading = channelReading({ kind: 'bsc', p }, undefined);
  return { decoder: sumProduct(tannerGraph(H), reading, cap), received: Uint8Array.from(y) };
}

/** Totals after each iteration; `step` would stop at a codeword, so that the rule itself is driven. */
function iterate(decoder: ReturnType<typeof sumProduct>, received: Uint8Array, count: number): number[][] {
  const totals: number[][] = [];
  decoder.begin(received);
  for (let i = 0; i < count; i++) {
    decoder.iterate();
    totals.push(Array.from(decoder.total));
  }
  return totals;
}

function choose(n: number, w: number): number {
  let count = 1;
  for (let i = 0; i < w; i++) count = (count * (n - i)) / (i + 1);
  return Math.round(count);
}
