import { describe, expect, test } from 'vitest';
import { matrixFromRows, type SparseMatrix } from '../../../src/core/codes/sparse-matrix.ts';
import { buildDesign, type DecoderSpec, deriveLdpc, ParamError } from '../../../src/core/index.ts';
import { fastShard, simdAvailable } from '../../../src/core/kernels/index.ts';
import { emitterFor } from '../../../src/core/kernels/kernel-for.ts';
import type { RunSpec } from '../../../src/core/simulation/run-spec.ts';
import { runShard } from '../../../src/core/simulation/shard.ts';

const plane = (q: number): SparseMatrix =>
  deriveLdpc(buildDesign({ family: 'projective-plane', params: { q } }), { checks: 'blocks' }).H;
const pg8 = plane(8);
const spec = (changes: Partial<RunSpec> = {}): RunSpec => ({
  H: pg8,
  channel: { kind: 'bsc', p: 0.04 },
  decoder: { kind: 'bit-flipping' },
  seed: 'fast',
  framesPerShard: 500,
  ...changes,
});

/** A matrix of column weight 3 and row weight 6 on so many columns: bit j in checks that a small generator picks. */
function regular36(n: number): SparseMatrix {
  const m = n / 2;
  const rows = Array.from({ length: m }, () => new Set<number>());
  let state = 12345;
  const next = (below: number) => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
  for (let j = 0; j < n; j++) {
    for (let t = 0; t < 3; ) {
      const row = rows[next(m)]!;
      if (row.has(j)) continue;
      row.add(j);
      t++;
    }
  }
  return matrixFromRows(
    n,
    rows.map((row) => [...row]),
  );
}

let large: SparseMatrix | undefined;

describe('this engine', () => {
  test('has SIMD, so that the tests here mean something', () => {
    expect(simdAvailable()).toBe(true);
  });
});

describe('a shard on a kernel', () => {
  test('gives the same tally on a second run, on an instance that has been used', async () => {
    const first = await fastShard(spec(), 3);
    expect(await fastShard(spec(), 4)).not.toEqual(first);
    expect(await fastShard(spec(), 3)).toEqual(first);
  });

  test('is not disturbed by another on the same kernel at the same time', async () => {
    const pause = () => new Promise<void>((resume) => setImmediate(resume));
    const both = await Promise.all([5, 6].map((index) => fastShard(spec({ framesPerShard: 5000 }), index, { pause })));
    for (const [at, index] of [5, 6].entries())
      expect(both[at]).toEqual(await fastShard(spec({ framesPerShard: 5000 }), index));
  });

  test('has the tally of random codewords sent, since every decoder here is symmetric', async () => {
    const decoders: DecoderSpec[] = [
      { kind: 'majority-logic' },
      { kind: 'bit-flipping' },
      { kind: 'gallager-b' },
      { kind: 'gradient-descent', iterations: 20 },
      { kind: 'min-sum' },
    ];
    for (const decoder of decoders) {
      const random = spec({ decoder, sent: 'random', framesPerShard: 150 });
      expect(await fastShard(random, 1)).toEqual(await runShard(random, 1, 'reference'));
    }
  });

  test('on the AWGN channel with hard decision equals the reference', async () => {
    const hard = spec({ channel: { kind: 'awgn-hard', ebn0Db: 4 }, rate: 45 / 73 });
    expect(await fastShard(hard, 0)).toEqual(await runShard(hard, 0, 'reference'));
  });

  test('of nothing but errorless frames ends at once', async () => {
    const tally = await fastShard(spec({ channel: { kind: 'stratum', weight: 0 }, framesPerShard: 1_000_000 }), 0);
    expect(tally).toEqual({
      frames: 1_000_000,
      frameErrors: 0,
      bitErrors: 0,
      bitErrorsSquared: 0,
      undetected: 0,
      iterations: 0,
      bits: 73_000_000,
      iterationHistogram: [1_000_000],
    });
  });

  test('stops with the signal’s reason, and the next shard is right', async () => {
    const expected = await fastShard(spec(), 9);
    const controller = new AbortController();
    let pauses = 0;
    const pause = async () => {
      if (++pauses === 2) controller.abort(new Error('stopped by the user'));
    };
    const long = fastShard(spec({ framesPerShard: 10_000_000 }), 9, { signal: controller.signal, pause });
    await expect(long).rejects.toThrow('stopped by the user');
    expect(pauses).toBe(2);
    expect(await fastShard(spec(), 9)).toEqual(expected);
  });

  test.each([
    { kind: 'bit-flipping', iterations: 6 },
    { kind: 'gallager-b', iterations: 4 },
    { kind: 'min-sum', iterations: 4 },
    { kind: 'min-sum', iterations: 4, schedule: 'flooding' },
    { kind: 'finite-alphabet', iterations: 4 },
  ] satisfies DecoderSpec[])('of 70,000 columns equals the reference: %j', async (decoder) => {
    large ??= regular36(70_000);
    const long = spec({ H: large, decoder, channel: { kind: 'bsc', p: 0.01 }, framesPerShard: 3 });
    expect(await fastShard(long, 0)).toEqual(await runShard(long, 0, 'reference'));
  });
});

describe('there is no kernel', () => {
  test.each([
    ['for elimination', spec({ decoder: { kind: 'elimination' }, channel: { kind: 'bec', e: 0.1 } })],
    ['for errors met by a decoder of erasures', spec({ decoder: { kind: 'peeling' } })],
    ['for erasures met by a decoder of errors', spec({ channel: { kind: 'bec', e: 0.1 } })],
    ['on the Z channel, whose errors depend on what is sent', spec({ channel: { kind: 'z', p: 0.01 } })],
    ['on the AWGN channel', spec({ decoder: { kind: 'min-sum' }, channel: { kind: 'awgn', ebn0Db: 3 } })],
    ['for a finite alphabet off column weight 3', spec({ decoder: { kind: 'finite-alphabet' } })],
  ])('%s', (_, given) => {
    expect(fastShard(given, 0)).toBeNull();
  });

  test('for settings the matrix does not allow: they are refused as the reference refuses them', () => {
    const refused: [Partial<RunSpec>, RegExp][] = [
      [{ decoder: { kind: 'bit-flipping', threshold: 10 } }, /threshold: got 10; .* 1 to 9/],
      [{ decoder: { kind: 'gallager-b', threshold: [2, 12] } }, /threshold: got 12/],
      [{ decoder: { kind: 'min-sum', c: 120 } }, /decoder\.c: got 120/],
      [{ decoder: { kind: 'min-sum', rMax: 40 } }, /rMax: got 40/],
      [{ H: matrixFromRows(3, [[0, 1]]) }, /empty column 2/],
      [{ channel: { kind: 'stratum', weight: 2 }, decoder: { kind: 'sum-product' } }, /designP/],
    ];
    for (const [changes, message] of refused) {
      expect(() => fastShard(spec(changes), 0)).toThrow(ParamError);
      expect(() => fastShard(spec(changes), 0)).toThrow(message);
    }
  });
});

describe('sum-product in tanh form', () => {
  const irregular = matrixFromRows(8, [[0, 1, 2, 3, 4, 5, 6], [0, 1, 2], [3, 4], [2, 5, 6], [1, 6, 7], [7]]);
  // Rounding may part the two on frames that never settle; on the same frames little else may.
  const agrees = async (changes: Partial<RunSpec>) => {
    const soft = spec({ decoder: { kind: 'sum-product' }, framesPerShard: 1000, ...changes });
    const fast = (await fastShard(soft, 0))!;
    const reference = await runShard(soft, 0, 'reference');
    expect(Math.abs(fast.frameErrors - reference.frameErrors)).toBeLessThanOrEqual(2);
    expect(Math.abs(fast.undetected - reference.undetected)).toBeLessThanOrEqual(2);
    expect(Math.abs(fast.bitErrors - reference.bitErrors)).toBeLessThanOrEqual(0.02 * reference.bitErrors);
    expect(fast.iterationHistogram.slice(0, 8)).toEqual(reference.iterationHistogram.slice(0, 8));
  };

  test.each([0.02, 0.03, 0.05, 0.5])('agrees with the reference, frame errors and bit errors, at p = %d', async (p) => {
    await agrees({ channel: { kind: 'bsc', p }, ...(p === 0.5 ? { framesPerShard: 100 } : {}) });
  });

  test('agrees on a small plane, where half the bits of an unsettled frame swing', async () => {
    await agrees({ H: plane(4), channel: { kind: 'bsc', p: 0.05 } });
  });

  test('keeps to a stated design p on a stratum', async () => {
    await agrees({ decoder: { kind: 'sum-product', designP: 0.02 }, channel: { kind: 'stratum', weight: 4 } });
  });

  test('meets irregular rows and columns, weight 1 among them', async () => {
    await agrees({ H: irregular, channel: { kind: 'bsc', p: 0.1 } });
  });

  test('holds where forty checks at their cut could underflow a product', async () => {
    await agrees({ H: plane(32), channel: { kind: 'bsc', p: 0.03 }, framesPerShard: 20 });
  });
});

describe('memory', () => {
  test('of every kernel stays under 64 MB at n = 4,095', () => {
    const { H } = deriveLdpc(buildDesign({ family: 'punctured-affine-plane', params: { q: 64 } }), {
      checks: 'blocks',
    });
    const decoders: DecoderSpec[] = [
      { kind: 'bit-flipping' },
      { kind: 'bit-flipping-max' },
      { kind: 'gallager-b' },
      { kind: 'gallager-b', threshold: [40, 36] },
      { kind: 'gradient-descent', flips: 'single' },
      { kind: 'min-sum', c: 12 },
      { kind: 'min-sum', c: 12, schedule: 'flooding' },
      { kind: 'sum-product' },
      { kind: 'peeling' },
    ];
    for (const decoder of decoders) {
      const image = emitterFor(decoder, H)!();
      expect(WebAssembly.validate(image.bytes)).toBe(true);
      expect(image.memoryBytes).toBeLessThan(64 * 2 ** 20);
    }
  });
});
