import { setTimeout as delay } from 'node:timers/promises';
import { expect, it } from 'vitest';
import { demoClient } from './api-client.ts';
import { startServer } from './built-server.ts';
import { framesPerShard, freshRun, tallyWith } from './run-kit.ts';

it('a server killed while shards come in keeps every shard that it acknowledged, and whole batches only', async () => {
  const server = await startServer();
  const client = await demoClient(server.base, 'engineer');
  const batchSize = 5;
  const { run, pointIds } = await freshRun(client, { frameErrors: 1e6, maxFrames: 1e6 * framesPerShard });
  const acknowledged: number[] = [];

  const post = async () => {
    for (let first = 0; ; first += batchSize) {
      const shards = Array.from({ length: batchSize }, (_, i) => {
        return { pointId: pointIds[0]!, index: first + i, tally: tallyWith((first + i) % 7) };
      });
      const answer = await client.post(`/runs/${run.id}/shards`, { shards }).catch(() => undefined);
      if (answer?.status !== 200) return;
      acknowledged.push(...shards.map((shard) => shard.index));
    }
  };
  const posting = post();
  await delay(700);
  await server.kill();
  await posting;
  expect(acknowledged.length).toBeGreaterThan(batchSize);

  const again = await startServer({ DATA_DIR: server.dataDir });
  try {
    const { body } = await (await demoClient(again.base, 'engineer')).get(`/runs/${run.id}`);
    const stored = body.points[0].nextIndex;
    expect(body.points[0].extra).toEqual([]);
    expect(stored).toBeGreaterThanOrEqual(acknowledged.length);
    expect(stored % batchSize).toBe(0);
    // The point's sum is that of its shards, to the last integer.
    const expected = Array.from({ length: stored }, (_, index) => index % 7).reduce((sum, errors) => sum + errors, 0);
    expect(body.points[0].tally).toMatchObject({ frames: stored * framesPerShard, frameErrors: expected });
  } finally {
    await again.stop();
  }
}, 300_000);
