import { describe, expect, it } from 'vitest';
import { binaryInputAwgn } from '../../../src/core/bounds/awgn-capacity.ts';
import { bchReference } from '../../../src/core/bounds/bch-reference.ts';
import { becConverse, becRandomCodingUnion } from '../../../src/core/bounds/bec-bounds.ts';
import {
  gilbertVarshamovBound,
  hammingBound,
  plotkinBound,
  singletonBound,
} from '../../../src/core/bounds/block-code-bounds.ts';
import { bscCapacity, bscDispersion, bscShannonLimit } from '../../../src/core/bounds/bsc-capacity.ts';
import { bscConverse } from '../../../src/core/bounds/bsc-converse.ts';
import { bscRandomCodingUnion } from '../../../src/core/bounds/bsc-random-coding.ts';
import { normalApproximation } from '../../../src/core/bounds/normal-approximation.ts';
import { normalQuantile, normalTail } from '../../../src/core/bounds/normal-tail.ts';
import { undetectedErrorRate, unionBound } from '../../../src/core/bounds/union-bound.ts';
import channelBounds from '../../reference/channel-bounds.json' with { type: 'json' };
import precise from '../../reference/high-precision.json' with { type: 'json' };
import planeCodes from '../../reference/plane-codes.json' with { type: 'json' };

interface Entry {
  parameters: Record<string, number>;
  value: unknown;
}
const entries = (file: object, prefix: string) =>
  Object.entries(file as Record<string, Entry>).filter(([id]) => id.startsWith(prefix));
const close = (found: number, expected: unknown, relative: number, id: string) =>
  expect(Math.abs(found / Number(expected) - 1), `${id}: ${found} for ${expected}`).toBeLessThan(relative);

describe('channel bounds against high-precision values', () => {
  it('the normal tail holds 12 digits at any depth, and its quantile undoes it', () => {
    for (const [id, { parameters, value }] of entries(precise, 'normal-tail-')) {
      close(normalTail(parameters.x!), value, 1e-12, id);
      close(normalQuantile(Number(value)), parameters.x!, 1e-12, id);
    }
  });

  it('capacity and dispersion of the BSC hold 12 digits, near one half and near zero too', () => {
    for (const [id, { parameters, value }] of entries(precise, 'bsc-capacity-')) {
      close(bscCapacity(parameters.p!), value, 1e-12, id);
    }
    for (const [id, { parameters, value }] of entries(channelBounds, 'E-cap-')) {
      const { C, V } = value as { C: string; V: string };
      close(bscCapacity(parameters.p!), C, 1e-13, id);
      close(bscDispersion(parameters.p!), V, 1e-13, id);
    }
    for (const [id, { parameters, value }] of entries(channelBounds, 'E-capinv-')) {
      close(bscShannonLimit(parameters.R!), value, 1e-12, id);
    }
  });

  it('the normal approximation holds 1e-9 up to n = 10^6 and down to p = 10^-12', () => {
    for (const [id, { parameters, value }] of entries(precise, 'normal-approximation-bsc')) {
      const { n, k, p } = parameters as { n: number; k: number; p: number };
      close(normalApproximation({ channel: { kind: 'bsc', p }, n, k }), value, 1e-9, id);
    }
    for (const [id, { parameters, value }] of entries(precise, 'normal-approximation-bec')) {
      const { n, k, e } = parameters as { n: number; k: number; e: number };
      close(normalApproximation({ channel: { kind: 'bec', e }, n, k }), value, 1e-9, id);
    }
  });

  it('capacity and dispersion of BPSK in Gaussian noise hold 10 digits', () => {
    for (const [id, { parameters, value }] of entries(precise, 'binary-awgn-')) {
      const found = binaryInputAwgn(parameters.sigma!);
      const { capacity, dispersion } = value as { capacity: string; dispersion: string };
      close(found.capacity, capacity, 1e-10, id);
      close(found.dispersion, dispersion, 1e-9, id);
    }
  });

  it('converse, random-coding bound and normal approximation agree with published code sizes', () => {
    // The stored sizes carry six decimals, which is a relative 10^-6 or so of the error rate.
    for (const [id, { parameters, value }] of entries(channelBounds, 'E-fbl-')) {
      const { n, p, eps } = parameters as { n?: number; p: number; eps: number };
      if (n === undefined) continue;
      const size = value as { converse_log2M: number; rcu_log2M: number; normal_approx: number };
      close(bscConverse({ n, k: size.converse_log2M, p }), eps, 1e-6, id);
      close(bscRandomCodingUnion({ n, k: size.rcu_log2M, p }), eps, 1e-6, id);
      close(normalApproximation({ channel: { kind: 'bsc', p }, n, k: size.normal_approx }), eps, 1e-6, id);
    }
  });

  it('converse and random-coding bound of the BSC hold 9 digits up to n = 10^6 and down to p = 10^-12', () => {
    for (const [id, { parameters, value }] of entries(precise, 'bsc-bounds-')) {
      const point = parameters as { n: number; k: number; p: number };
      const { converse, rcu } = value as { converse: string; rcu: string };
      close(bscConverse(point), converse, 1e-9, id);
      close(bscRandomCodingUnion(point), rcu, 1e-9, id);
    }
  });

  it('the normal approximation passes the converse at n = 273, p = 0.02, so it is no bound', () => {
    const k = 198;
    expect(normalApproximation({ channel: { kind: 'bsc', p: 0.02 }, n: 273, k })).toBeLessThan(
      bscConverse({ n: 273, k, p: 0.02 }),
    );
  });

  it('the erasure channel has its converse below its random-coding bound, both to 9 digits up to n = 10^6', () => {
    for (const [id, { parameters, value }] of entries(precise, 'bec-bounds-')) {
      const point = parameters as { n: number; k: number; e: number };
      const { converse, rcu } = value as { converse: string; rcu: string };
      close(becConverse(point), converse, 1e-9, id);
      close(becRandomCodingUnion(point), rcu, 1e-9, id);
      expect(becConverse(point), id).toBeLessThanOrEqual(becRandomCodingUnion(point));
    }
  });
});

describe('bounds on block codes', () => {
  it('bounded-distance BCH: radius by cyclotomic cosets, rate of failure to 10 digits', () => {
    for (const [id, { parameters, value }] of entries(precise, 'bch-')) {
      const { n, k, p } = parameters as { n: number; k: number; p: number };
      const bch = bchReference({ n, k });
      const { t, fer } = value as { t: number; fer: string };
      expect(bch.t, id).toBe(t);
      close(bch.fer(p), fer, 1e-10, id);
    }
    // Lin and Costello 2004, Appendix C, from memory.
    expect([
      bchReference({ n: 127, k: 64 }).t,
      bchReference({ n: 63, k: 45 }).t,
      bchReference({ n: 15, k: 5 }).t,
    ]).toEqual([10, 3, 3]);
  });

  it('perfect codes meet the Hamming bound', () => {
    expect(hammingBound({ n: 7, d: 3 })).toBeCloseTo(4, 12);
    expect(hammingBound({ n: 23, d: 7 })).toBeCloseTo(12, 12);
  });

  it('Gilbert–Varshamov promises what Hamming and Singleton allow', () => {
    expect(gilbertVarshamovBound({ n: 7, d: 3 })).toBe(4);
    for (let d = 1; d <= 20; d++) {
      const promised = gilbertVarshamovBound({ n: 40, d });
      expect(promised).toBeLessThanOrEqual(hammingBound({ n: 40, d }) + 1e-9);
      expect(promised).toBeLessThanOrEqual(singletonBound({ n: 40, d }));
    }
  });

  it('Plotkin gives the simplex codes and is silent below half the length', () => {
    expect(plotkinBound({ n: 7, d: 4 })).toBe(8);
    expect(plotkinBound({ n: 8, d: 4 })).toBe(16);
    expect(plotkinBound({ n: 20, d: 4 })).toBeNull();
  });

  it('the union bound lies above maximum-likelihood decoding of PG(2,4) and near it at small p', () => {
    const weights = Object.entries(planeCodes['A-pg2wd-4'].value).map(([w, count]) => [Number(w), count] as const);
    const exact = channelBounds['E-ml-PG24'].value.ML_FER as Record<string, string>;
    for (const [p, fer] of Object.entries(exact)) expect(unionBound(weights, Number(p))).toBeGreaterThan(Number(fer));
    expect(unionBound(weights, 0.01) / Number(exact['0.01'])).toBeLessThan(2.5);
  });

  it('sphere packing and Gilbert–Varshamov equal whole-number sums up to n = 10^6', () => {
    for (const [id, { parameters, value }] of entries(precise, 'block-bounds-')) {
      const code = parameters as { n: number; d: number };
      const { hamming_log2, gv_k } = value as { hamming_log2: string; gv_k: number };
      close(hammingBound(code), hamming_log2, 1e-12, id);
      expect(gilbertVarshamovBound(code), id).toBe(gv_k);
    }
  });

  it('union bound and undetected errors hold 9 digits at any depth, with counts past what a double holds', () => {
    const weightsOf = (parameters: object) =>
      (parameters as { weights: [number, string][] }).weights.map(([w, count]) => [w, BigInt(count)] as const);
    for (const [id, { parameters, value }] of entries(precise, 'union-bound-'))
      close(unionBound(weightsOf(parameters), parameters.p!), value, 1e-9, id);
    for (const [id, { parameters, value }] of entries(precise, 'undetected-'))
      close(undetectedErrorRate(weightsOf(parameters), parameters.n!, parameters.p!), value, 1e-9, id);
  });

  it('undetected errors of PG(2,4) follow its weights', () => {
    const weights = Object.entries(planeCodes['A-pg2wd-4'].value).map(([w, count]) => [Number(w), count] as const);
    for (const [p, rate] of Object.entries(channelBounds['E-ud-PG2-4'].value)) {
      close(undetectedErrorRate(weights, 21, Number(p)), rate, 1e-12, p);
    }
  });
});
