import useSWR from 'swr';
import { endpoints } from '@/api/endpoints.ts';
import type { Point } from '@/api/runs.ts';
import type { KernelDescription } from '@/core/simulation/shard.ts';
import { call } from './api.ts';
import { describeInWorker } from './calibrate-pool.ts';
import { decoderKey } from './curves/decoder-text.ts';

/** Most pairs of code and decoder that are looked at: each costs the making of a kernel. */
const MOST_PAIRS = 6;

export interface PointKernel extends KernelDescription {
  point: Point;
}

/** Which path the shards of a run take in this browser, once it is worked on here; null while not known. A pair that
 *  the engine refuses is left out: its shards say why. */
export function useKernels(points: readonly Point[], isWorkedOn: boolean): PointKernel[] | null {
  const pairs = [...new Map(points.map((point) => [`${point.codeId} ${decoderKey(point.decoder)}`, point]))];
  const shown = pairs.slice(0, MOST_PAIRS);
  const names = shown.map(([name]) => name).join('\n');
  const { data } = useSWR(
    isWorkedOn && shown.length > 0 ? ['kernels', names] : null,
    () => Promise.all(shown.map(([, point]) => kernelOf(point))),
    { revalidateOnFocus: false, revalidateIfStale: false },
  );
  return data ? data.flatMap((kernel) => kernel ?? []) : null;
}

async function kernelOf(point: Point): Promise<PointKernel | null> {
  try {
    const { code } = await call(endpoints.getCode, { params: { id: point.codeId } });
    return { point, ...(await describeInWorker(code, point.channel, point.decoder, point.k / point.n)) };
  } catch {
    return null;
  }
}
