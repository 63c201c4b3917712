import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { enumerateStratum } from '@/core/simulation/enumerate-stratum.ts';
import { guaranteedRadius } from '@/core/simulation/guaranteed-radius.ts';
import { failureOf } from '../failure.ts';
import type { Answer, StrataApi } from './api.ts';

/** The service of one worker; a task is cut off by ending the worker. */
export function createStrataApi(): StrataApi {
  const matrices = new Map<string, SparseMatrix>();
  const matrixOf = (key: string): SparseMatrix => {
    const H = matrices.get(key);
    if (!H) throw new Error(`no matrix named ${key} was loaded`);
    return H;
  };
  return {
    load(key, H) {
      matrices.set(key, H);
    },
    prove(key, decoder) {
      const from = performance.now();
      try {
        return timed(guaranteedRadius(matrixOf(key), decoder), from);
      } catch (error) {
        return { ok: false, failure: failureOf(error) };
      }
    },
    async enumerate(key, decoder, weight, range) {
      const from = performance.now();
      try {
        // The channel only names the kind of errors, and no frame is drawn.
        const spec = { H: matrixOf(key), channel: { kind: 'stratum' as const, weight }, decoder };
        return timed(await enumerateStratum({ ...spec, seed: '', framesPerShard: 1 }, weight, range), from);
      } catch (error) {
        return { ok: false, failure: failureOf(error) };
      }
    },
  };
}

const timed = <T>(value: T, from: number): Answer<T> => ({ ok: true, value, elapsedMs: performance.now() - from });
