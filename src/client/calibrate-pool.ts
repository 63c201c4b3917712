import type { CalibrateAnswer, CalibrateApi } from '@workers/calibrate/api.ts';
import { proxy } from 'comlink';
import type { Code } from '@/api/codes.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { Calibration } from '@/core/simulation/calibrate.ts';
import type { RunSpec } from '@/core/simulation/run-spec.ts';
import type { KernelDescription } from '@/core/simulation/shard.ts';
import { matrixOf } from './code-matrix.ts';
import { createWorkerPool, type WorkerPool } from './worker-pool.ts';

type NamedCode = Pick<Code, 'id' | 'fingerprint'>;

let pool: WorkerPool<CalibrateApi> | undefined;
const spawn = () =>
  new Worker(new URL('../../workers/calibrate/browser.ts', import.meta.url), { type: 'module', name: 'calibrate' });

export interface CalibrationRequest {
  channel: Channel;
  decoder: DecoderSpec;
  seed: string;
  frames: number;
}

/** Tries a decoder's settings on one code, off the page's thread.
 *  @throws Error as the engine refuses; AbortError when the signal fires. */
export async function calibrateInWorker(
  code: NamedCode,
  { frames, ...request }: CalibrationRequest,
  options: { signal: AbortSignal; onTrial: (done: number, all: number) => void },
): Promise<Calibration> {
  const spec: RunSpec = { ...request, framesPerShard: frames, H: await matrixOf(code) };
  const told = proxy(options.onTrial);
  return ask<Calibration>(async (remote) => await remote.calibrate(spec, told), options.signal);
}

/** The path that shards of a code and decoder take in this browser, and why. */
export async function describeInWorker(
  code: NamedCode,
  channel: Channel,
  decoder: DecoderSpec,
  rate: number,
): Promise<KernelDescription> {
  const spec: RunSpec = { H: await matrixOf(code), channel, decoder, seed: '', framesPerShard: 1, rate };
  return ask<KernelDescription>(async (remote) => await remote.describe(spec));
}

type Task<T> = (remote: Parameters<Parameters<WorkerPool<CalibrateApi>['run']>[0]>[0]) => Promise<CalibrateAnswer<T>>;

async function ask<T>(task: Task<T>, signal?: AbortSignal): Promise<T> {
  pool ??= createWorkerPool<CalibrateApi>(spawn, 1);
  const answer = await pool.run(task, signal);
  if (!answer.ok) throw new Error(answer.failure.message);
  return answer.value;
}
