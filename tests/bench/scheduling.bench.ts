// What scheduling costs: shards taken in while others watch, a server's threads kept busy, cores used by a pool.
import { readFileSync } from 'node:fs';
import { setTimeout as delay } from 'node:timers/promises';
import { buildDesign, deriveLdpc } from '../../src/core/index.ts';
import { fastShard } from '../../src/core/kernels/index.ts';
import { type ApiClient, demoClient } from '../server/api-client.ts';
import { startServer } from '../server/built-server.ts';
import { freshRun, tallyWith } from '../server/run-kit.ts';
import type { Row } from './row.ts';

export async function bench(): Promise<Row[]> {
  return [...(await intakeRows()), ...(await overheadRows())];
}

const batch = 50;
const perSecond = 2000;
const seconds = 10;
const watchers = 20;

/** Batches at a fixed rate, sent whether or not the last is answered, as many tabs would. */
async function intakeRows(): Promise<Row[]> {
  const server = await startServer();
  const client = await demoClient(server.base, 'engineer');
  const shards = seconds * perSecond;
  const { run, pointIds } = await freshRun(client, { frameErrors: 1_000_000, maxFrames: 100 * (shards + 10_000) });
  const watching = new AbortController();
  const events = await Promise.all(
    Array.from({ length: watchers }, () => watch(client, `/api/v1/runs/${run.id}/events`, watching.signal)),
  );
  let next = 0;
  const post = async () => {
    const from = performance.now();
    const taken = Array.from({ length: batch }, () => ({ pointId: pointIds[0], index: next++, tally: tallyWith(1) }));
    const { status, body } = await client.post(`/runs/${run.id}/shards`, { shards: taken });
    if (status !== 200 || body.accepted !== batch) throw new Error(`${status} ${JSON.stringify(body)}`);
    return performance.now() - from;
  };
  for (let warm = 0; warm < 20; warm++) await post();
  const times: Promise<number>[] = [];
  const begin = performance.now();
  const cpuBefore = processorMs(server.process.pid!);
  for (let k = 0; k < shards / batch; k++) {
    await delay(Math.max(0, begin + (k * 1000 * batch) / perSecond - performance.now()));
    times.push(post());
  }
  const sorted = (await Promise.all(times)).sort((a, b) => a - b);
  const elapsedS = (performance.now() - begin) / 1000;
  const cpuMs = processorMs(server.process.pid!) - cpuBefore;
  const { frames } = (await client.get(`/runs/${run.id}`)).body.run;
  if (frames !== next * 100) throw new Error(`${frames} frames of ${next} shards`);
  watching.abort();
  const heard = Math.min(...events.map(({ count }) => count()));
  await server.stop();
  return [
    {
      metric: `shards a second taken in batches of ${batch}, each committed before its answer, ${watchers} watching`,
      value: shards / elapsedS,
      unit: '1/s',
      must: 0.99 * perSecond,
      better: 'higher',
      note: `asked for ${perSecond}`,
    },
    { metric: 'processor time of the server a batch', value: (cpuMs * batch) / shards, unit: 'ms' },
    { metric: 'a batch, median', value: sorted[Math.floor(sorted.length / 2)]!, unit: 'ms' },
    { metric: 'a batch, 99th centile', value: sorted[Math.floor(sorted.length * 0.99)]!, unit: 'ms', must: 50 },
    { metric: 'events that the least watcher got', value: heard, unit: 'events' },
  ];
}

/** Processor time that a process has taken, of which Linux counts hundredths of a second. */
function processorMs(pid: number): number {
  const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ')[1]!.split(' ');
  return 10 * (Number(fields[11]) + Number(fields[12]));
}

/** Counts the events of a stream until it is told to end. */
async function watch(client: ApiClient, path: string, signal: AbortSignal) {
  const response = await client.fetch(path, { signal, headers: { accept: 'text/event-stream' } });
  const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
  let count = 0;
  const read = async () => {
    for (;;) {
      const { value, done } = await reader.read();
      if (done) return;
      count += value.split('\nevent: run').length - 1 + (value.startsWith('event: run') ? 1 : 0);
    }
  };
  void read().catch(() => {});
  return { count: () => count };
}

const asked = {
  design: { family: 'projective-plane', params: { q: 16 } },
  derivation: { kind: 'ldpc', checks: 'blocks' },
} as const;
const point = { channel: { kind: 'bsc', p: 0.012 }, decoder: { kind: 'min-sum' } } as const;

/** The same shards computed here one after the other, and by the threads of a server that leases, stores and counts
 *  them. */
async function overheadRows(): Promise<Row[]> {
  const { H } = deriveLdpc(buildDesign(asked.design), asked.derivation);
  const here = async (framesPerShard: number, shards: number) => {
    const spec = { H, ...point, seed: 'bench', framesPerShard };
    await fastShard(spec, shards);
    const from = performance.now();
    for (let index = 0; index < shards; index++) await fastShard(spec, index);
    return performance.now() - from;
  };
  const aSecond = Math.round((50_000 * 2 * 1000) / (await here(50_000, 2)));
  const plainMs = await here(aSecond, 10);
  const oneMs = await onServer(1, aSecond, 10);
  const twoMs = await onServer(2, aSecond, 20);
  return [
    {
      metric: 'ten shards of 1 s on a thread of the server, longer than without a server by',
      value: 100 * (oneMs / plainMs - 1),
      unit: '%',
      must: 2,
      note: `${(plainMs / 10).toFixed(0)} ms a shard`,
    },
    {
      metric: 'two threads of the server against one',
      value: (2 * oneMs) / twoMs,
      unit: '×',
      must: 1.8,
      better: 'higher',
    },
  ];
}

/** Milliseconds from stating a run to hearing that it has finished, its kernel made before. */
async function onServer(threads: number, framesPerShard: number, shards: number): Promise<number> {
  const server = await startServer({ SIMULATION_THREADS: String(threads) });
  const client = await demoClient(server.base, 'engineer');
  const { projectId, codeId } = await freshRun(client);
  const finished = async (count: number, name: string) => {
    const from = performance.now();
    const { body } = await client.post(`/projects/${projectId}/runs`, {
      ...{ name, seed: 'bench', framesPerShard, place: 'server', stopping: { maxFrames: framesPerShard * count } },
      points: [{ codeId, ...point }],
    });
    await client.get(`/runs/${body.run.id}/end?seconds=60`);
    return performance.now() - from;
  };
  await finished(threads, 'warm');
  const elapsedMs = await finished(shards, 'measured');
  await server.stop();
  return elapsedMs;
}
