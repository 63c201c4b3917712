import type { Answer, StrataApi } from '@workers/strata/api.ts';
import type { Code } from '@/api/codes.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Graded } from '@/core/evidence.ts';
import type { Enumeration } from '@/core/simulation/enumerate-stratum.ts';
import { matrixOf } from '../code-matrix.ts';
import { createWorkerPool, type WorkerPool } from '../worker-pool.ts';

type NamedCode = Pick<Code, 'id' | 'fingerprint'>;

let pool: WorkerPool<StrataApi> | undefined;
const spawn = () =>
  new Worker(new URL('../../../workers/strata/browser.ts', import.meta.url), { type: 'module', name: 'strata' });

/** The radius proved for a code and decoder, off the page's thread; null where no theorem is known.
 *  @throws Error when the matrix cannot be fetched or is refused. */
export async function proveRadius(code: NamedCode, decoder: DecoderSpec): Promise<Graded<number> | null> {
  return (await ask<Graded<number> | null>(code, async (remote) => await remote.prove(code.id, decoder))).value;
}

/** A part of the enumeration of one weight.
 *  @throws Error as the engine refuses; AbortError when the signal fires. */
export async function enumeratePart(
  code: NamedCode,
  decoder: DecoderSpec,
  weight: number,
  range: { from: number; to: number; limitPatterns: number },
  signal: AbortSignal,
): Promise<{ value: Enumeration; elapsedMs: number }> {
  return ask<Enumeration>(code, async (remote) => await remote.enumerate(code.id, decoder, weight, range), signal);
}

type Remote = Parameters<Parameters<WorkerPool<StrataApi>['run']>[0]>[0];

async function ask<T>(
  code: NamedCode,
  task: (remote: Remote) => Promise<Answer<T>>,
  signal?: AbortSignal,
): Promise<{ value: T; elapsedMs: number }> {
  const H = await matrixOf(code);
  pool ??= createWorkerPool<StrataApi>(spawn, 1);
  const answer = await pool.run(async (remote, loaded) => {
    if (!loaded.has(code.id)) {
      await remote.load(code.id, H);
      loaded.add(code.id);
    }
    return await task(remote);
  }, signal);
  if (!answer.ok) throw new Error(answer.failure.message);
  return answer;
}
