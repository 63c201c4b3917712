import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type ApiClient, demoClient, demoProject } from './api-client.ts';
import { type RunningServer, startServer } from './built-server.ts';

let server: RunningServer;
let client: ApiClient;
let projectId: string;
beforeAll(async () => {
  server = await startServer();
  client = await demoClient(server.base, 'engineer');
  projectId = await demoProject(client, 'Shore archive');
}, 300_000);
afterAll(() => server.stop());

const point = { p: 0.01, frames: 1000, frameErrors: 3, bitErrors: 9 };
const measured = { name: 'Bench B', fileName: 'b.csv', n: 273, k: 191, points: [point] };
const send = (change: object = {}) => client.post(`/projects/${projectId}/measurements`, { ...measured, ...change });

describe('measured data', () => {
  it('are kept, listed to every member and removed', async () => {
    const { status, body } = await send();
    expect(status).toBe(201);
    const { id } = body.measurement;
    const viewer = await demoClient(server.base, 'viewer');
    const listed = await viewer.get(`/projects/${projectId}/measurements`);
    expect(listed.body.measurements[0]).toMatchObject({ ...measured, id, createdBy: 'Demo engineer' });
    // 3 of 1000 at 95 %: 0.000619 to 0.008742 (Clopper and Pearson 1934, by the beta quantiles of SciPy 1.10).
    const { lower, upper } = listed.body.measurements[0].points[0].interval;
    expect([lower, upper]).toEqual([expect.closeTo(0.000619, 6), expect.closeTo(0.008742, 6)]);
    expect((await viewer.call('DELETE', `/measurements/${id}`)).status).toBe(403);
    expect((await client.call('DELETE', `/measurements/${id}`)).status).toBe(204);
    expect((await client.call('DELETE', `/measurements/${id}`)).status).toBe(404);
  });

  it.each([
    ['p', { points: [{ ...point, p: 0.6 }] }, 'points.0.p', /at most 0\.5/],
    ['frames', { points: [{ ...point, frames: 0 }] }, 'points.0.frames', /from 1/],
    ['frame errors', { points: [{ ...point, frameErrors: 1001 }] }, 'points.0.frameErrors', /1000 frames/],
    ['bit errors', { points: [{ ...point, bitErrors: 2 }] }, 'points.0.bitErrors', /at least one/],
    ['bit errors', { points: [{ ...point, bitErrors: 820 }] }, 'points.0.bitErrors', /n = 273/],
    ['a point twice', { points: [point, point] }, 'points.1.p', /once/],
    ['no points', { points: [] }, 'points', /at least one/],
    ['k', { k: 274 }, 'k', /n = 273/],
    ['name', { name: ' ' }, 'name', /1 to 120/],
  ])('with a wrong %s are refused by name', async (_, change, field, accepted) => {
    const { status, body } = await send(change);
    expect([status, body.error.fields[field]]).toEqual([400, expect.stringMatching(accepted)]);
  });

  it('may not be added by a viewer, nor seen by a stranger', async () => {
    const viewer = await demoClient(server.base, 'viewer');
    expect((await viewer.post(`/projects/${projectId}/measurements`, measured)).status).toBe(403);
    const own = (await client.post('/projects', { name: 'Alone' })).body.project.id;
    expect((await viewer.get(`/projects/${own}/measurements`)).status).toBe(404);
  });
});
