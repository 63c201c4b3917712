import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { enumerateStratum } from '@/core/simulation/enumerate-stratum.ts';
import type { RunSpec } from '@/core/simulation/run-spec.ts';
import { runShard } from '@/core/simulation/shard.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import type { ShardAnswer, SimulateApi, SpecOptions } from './api.ts';
import { Recent } from './recent.ts';

const specsKept = 256;
const matricesKept = 16;

/** The simulation service of one worker, the same behind comlink and behind worker threads. */
export function createSimulateApi(): SimulateApi {
  const specs = new Recent<{ spec: RunSpec; options: SpecOptions }>(specsKept);
  const matrices = new Recent<SparseMatrix>(matricesKept);
  return {
    load(key, spec, options = {}) {
      const { matrixKey } = options;
      const H = (matrixKey !== undefined && matrices.get(matrixKey)) || spec.H;
      if (matrixKey !== undefined) matrices.set(matrixKey, H);
      specs.set(key, { spec: { ...spec, H }, options });
    },
    async shard(key, index): Promise<ShardAnswer> {
      const known = specs.get(key);
      if (!known) return { ok: false, failure: { code: 'unknown-spec', message: `no spec named ${key} is loaded` } };
      const from = performance.now();
      try {
        const tally = await compute(known.spec, known.options, index);
        return { ok: true, tally, elapsedMs: performance.now() - from };
      } catch (error) {
        if (!(error instanceof Error)) throw error;
        const { code } = error as Error & { code?: string };
        return { ok: false, failure: { code: code ?? 'internal', message: error.message } };
      }
    },
  };
}

async function compute(spec: RunSpec, { branchesPerShard }: SpecOptions, index: number): Promise<Tally> {
  const { channel } = spec;
  if (branchesPerShard === undefined || channel.kind !== 'stratum') return runShard(spec, index);
  const from = index * branchesPerShard;
  const part = await enumerateStratum(spec, channel.weight, { from, to: from + branchesPerShard });
  const { frames, frameErrors, bitErrors, bitErrorsSquared, undetected, iterations, bits, iterationHistogram } = part;
  return { frames, frameErrors, bitErrors, bitErrorsSquared, undetected, iterations, bits, iterationHistogram };
}
