import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { SWRConfig } from 'swr';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Code } from '@/api/codes.ts';
import type { Fleet } from '@/api/fleet.ts';
import { type NewRun, newRunSchema } from '@/api/runs.ts';
import { NewRunForm } from '@/components/runs/NewRunForm.tsx';

const code: Code = {
  id: 'c1',
  projectId: 'p1',
  name: 'PG(2,16)',
  design: { family: 'projective-plane', params: { q: 16 } },
  designTitle: 'projective plane, q = 16',
  derivation: { kind: 'ldpc', checks: 'blocks' },
  n: 273,
  k: 191,
  rows: 273,
  ones: 4641,
  fingerprint: '0'.repeat(64),
  certificate: null,
  properties: [],
  rowWeights: [[17, 273]],
  columnWeights: [[17, 273]],
  createdAt: '2026-12-01T05:00:00Z',
  createdBy: 'engineer',
};

const noFleet: Fleet = { redis: 'off', release: '0.1.0', serverThreads: 2, machines: [] };

/** A server that holds one code and answers a posted run as told. */
function server(answer: (run: NewRun) => Response) {
  const posted: NewRun[] = [];
  vi.stubGlobal('fetch', async (address: string, init?: RequestInit) => {
    if (init?.method === 'POST') {
      posted.push(JSON.parse(String(init.body)) as NewRun);
      return answer(posted.at(-1)!);
    }
    if (address.includes('/codes')) return Response.json({ codes: [code] });
    if (address.includes('/fleet')) return Response.json(noFleet);
    return Response.json({ requirements: { targetFer: 1e-6, channel: { kind: 'bsc', p: 0.004 } }, updatedAt: null });
  });
  return posted;
}

const refusal = (fields: Record<string, string>) =>
  Response.json({ error: { code: 'bad-input', message: 'The run was not accepted.', fields } }, { status: 422 });

function show() {
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <NewRunForm projectId="p1" />
    </SWRConfig>,
  );
  return screen.findByLabelText(/PG\(2,16\)/);
}

const state = () => fireEvent.click(screen.getByText('State the run'));

describe('the form of a new run', () => {
  afterEach(() => {
    cleanup();
    vi.unstubAllGlobals();
    vi.restoreAllMocks();
  });

  it('proposes a seed, the required channel point and a name, and posts what the schema accepts', async () => {
    const posted = server(() => refusal({}));
    fireEvent.click(await show());
    expect((screen.getByLabelText('Seed') as HTMLInputElement).value).toMatch(/^([0-9a-f]{4}-){5}[0-9a-f]{4}$/);
    await waitFor(() => expect((screen.getByLabelText('To p') as HTMLInputElement).value).toBe('0.004'));
    expect((screen.getByLabelText('Frames per shard') as HTMLInputElement).value).toBe('5000');
    expect(document.body.textContent).toContain('5 points, at most 1000 shards.');
    state();
    await waitFor(() => expect(posted).toHaveLength(1));
    expect(newRunSchema.parse(posted[0])).toMatchObject({ name: 'PG(2,16): Gallager B', framesPerShard: 5000 });
    expect(posted[0]?.points.at(-1)?.channel).toEqual({ kind: 'bsc', p: 0.004 });
  });

  it('sends nothing that is not accepted and says at the field what would be', async () => {
    const posted = server(() => refusal({}));
    await show();
    fireEvent.change(screen.getByLabelText('From p'), { target: { value: '0.7' } });
    state();
    expect(document.body.textContent).toContain('a crossover probability above 0 and at most 0.5');
    expect(document.body.textContent).toContain('at least one code');
    expect(screen.getByLabelText('From p').getAttribute('aria-invalid')).toBe('true');
    expect(posted).toHaveLength(0);
  });

  it('shows what the server refuses at the field it names', async () => {
    server(() => refusal({ framesPerShard: 'at most 120 for a code of length 273' }));
    fireEvent.click(await show());
    state();
    await screen.findByText('at most 120 for a code of length 273', { exact: false });
    expect(screen.getByLabelText('Frames per shard').getAttribute('aria-invalid')).toBe('true');
    expect(document.body.textContent).toContain('Nothing was stored.');
  });

  it('states a limit to be shown on the server, in place of points', async () => {
    const posted = server(() => refusal({ 'goal.p': 'a smaller p' }));
    fireEvent.click(await show());
    fireEvent.click(screen.getByLabelText(/Show a limit/));
    await waitFor(() => expect((screen.getByLabelText('At p') as HTMLInputElement).value).toBe('0.004'));
    expect((screen.getByLabelText('Limit') as HTMLInputElement).value).toBe('0.000001');
    const place = screen.getByLabelText('Computed') as HTMLSelectElement;
    await waitFor(() => expect(place.textContent).toContain('on a fleet (the server has no REDIS_URL)'));
    fireEvent.change(place, { target: { value: 'server' } });
    state();
    await waitFor(() => expect(posted).toHaveLength(1));
    expect(posted[0]).toMatchObject({
      goal: { kind: 'limit', codeId: 'c1', decoder: { kind: 'gallager-b' }, p: 0.004, rate: 'fer', target: 1e-6 },
      place: 'server',
      points: [],
      stopping: { maxFrames: 1e8 },
    });
    await screen.findByText('a smaller p', { exact: false });
    expect(screen.getByLabelText('At p').getAttribute('aria-invalid')).toBe('true');
  });

  it('offers the way to a first code where there is none', async () => {
    const nothing = { codes: [], requirements: null, updatedAt: null };
    vi.stubGlobal('fetch', async (address: string) => Response.json(address.includes('/fleet') ? noFleet : nothing));
    render(
      <SWRConfig value={{ provider: () => new Map() }}>
        <NewRunForm projectId="p1" />
      </SWRConfig>,
    );
    const link = await screen.findByRole('link', { name: 'Build a code' });
    expect(link.getAttribute('href')).toBe('/projects/p1/codes/new');
  });
});
