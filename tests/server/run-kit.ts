import type { Tally } from '@/core/simulation/tally.ts';
import { type ApiClient, demoProject } from './api-client.ts';

export const framesPerShard = 100;

/** A run of two points over the demo's PG(2,16), and a maker of tallies that could be its shards'. */
export async function freshRun(client: ApiClient, { frameErrors = 1000, maxFrames = 1000 } = {}) {
  const projectId = await demoProject(client, 'Shore archive');
  const codes = (await client.get(`/projects/${projectId}/codes`)).body.codes;
  const code = codes.find((one: { n: number }) => one.n === 273);
  const points = [0.01, 0.02].map((p) => ({
    codeId: code.id,
    channel: { kind: 'bsc', p },
    decoder: { kind: 'gallager-b' },
  }));
  const stated = { name: 'A test', seed: 'a test', framesPerShard, stopping: { frameErrors, maxFrames } };
  const { status, body } = await client.post(`/projects/${projectId}/runs`, { ...stated, place: 'browser', points });
  if (status !== 201) throw new Error(JSON.stringify(body));
  return {
    projectId,
    codeId: code.id as string,
    run: body.run,
    pointIds: body.run.points.map(({ id }: { id: string }) => id) as string[],
  };
}

/** A possible tally with so many failed frames of one wrong bit each. */
export function tallyWith(frameErrors: number, n = 273): Tally {
  return {
    frames: framesPerShard,
    frameErrors,
    bitErrors: frameErrors,
    bitErrorsSquared: frameErrors,
    undetected: 0,
    iterations: framesPerShard,
    bits: framesPerShard * n,
    iterationHistogram: [0, framesPerShard],
  };
}
