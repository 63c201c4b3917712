import { afterAll, beforeAll, expect, it } from 'vitest';
import { type ApiClient, demoClient } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';
import { freshRun, tallyWith } from './run-kit.ts';

let server: RunningServer;
let client: ApiClient;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'engineer');
}, 300_000);
afterAll(() => server.stop());

/** Reads `run` events off a stream, one a call. */
async function openStream(runId: string, headers: Record<string, string> = {}) {
  const abort = new AbortController();
  const response = await client.fetch(`/api/v1/runs/${runId}/events`, { headers, signal: abort.signal });
  const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
  let buffered = '';
  const next = async () => {
    for (;;) {
      const match = /event: run\ndata: (.*)\n\n/.exec(buffered);
      if (match) {
        buffered = buffered.slice(match.index + match[0].length);
        return JSON.parse(match[1]!);
      }
      const { value, done } = await reader.read();
      if (done) throw new Error('The stream ended.');
      buffered += value;
    }
  };
  return { response, next, close: () => abort.abort() };
}

it('a run tells its state at once, then each commit with the points that changed', async () => {
  const { run, pointIds } = await freshRun(client);
  const stream = await openStream(run.id, { 'last-event-id': '12345' });
  expect(stream.response.headers.get('content-type')).toBe('text/event-stream');
  expect(stream.response.headers.get('content-encoding')).toBeNull();
  const first = await stream.next();
  expect([first.run.state, first.points.length]).toEqual(['ready', 2]);

  await client.post(`/runs/${run.id}/shards`, { shards: [{ pointId: pointIds[1], index: 0, tally: tallyWith(2) }] });
  const second = await stream.next();
  expect(second.run).toMatchObject({ state: 'running', frames: 100, frameErrors: 2 });
  expect(second.points.map((point: { id: string }) => point.id)).toEqual([pointIds[1]]);

  await client.call('PATCH', `/runs/${run.id}`, { state: 'paused' });
  expect(await stream.next()).toMatchObject({ run: { state: 'paused' }, points: [] });
  stream.close();
});

it('a run that is not shared has no events', async () => {
  const owner = await demoClient(server.base, 'owner');
  const { body } = await owner.post('/projects', { name: 'Hidden' });
  expect(body.project.id).toMatch(/^[0-9a-z]{26}$/);
  const response = await client.fetch('/api/v1/runs/0000000000000000000000000a/events');
  expect(response.status).toBe(404);
});

it('a server told to end does so although streams are open', async () => {
  const other = await startServer();
  const engineer = await demoClient(other.base, 'engineer');
  const { run } = await freshRun(engineer);
  const response = await engineer.fetch(`/api/v1/runs/${run.id}/events`);
  const from = Date.now();
  await other.stop();
  expect(Date.now() - from).toBeLessThan(5000);
  await response.body?.cancel().catch(() => {});
}, 60_000);
