import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { SWRConfig } from 'swr';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { RunDriverHandle } from '@/client/use-run-driver.ts';
import { GoalBlock } from '@/components/runs/GoalBlock.tsx';
import { goalText } from '@/components/runs/goal-text.ts';
import { RestOfRun } from '@/components/runs/RestOfRun.tsx';
import { RunPanel } from '@/components/runs/RunPanel.tsx';
import { SourceTables } from '@/components/runs/SourceTables.tsx';
import { examplePoint } from '../example-points.ts';
import { exampleRun } from '../example-runs.ts';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const points = [examplePoint({ id: 'a', done: true })];
const driver: RunDriverHandle = {
  ...{ status: 'idle', workers: 2, framesPerSecond: 0, timeLeftMs: null, fractionDone: 0, message: null },
  ...{ pointTallies: new Map(), start: vi.fn(), pause: vi.fn(), resume: vi.fn(), stop: vi.fn() },
};

/** A server that takes every change, or refuses each with a message. */
function server(answers: { refuse?: string; provenance?: unknown } = {}) {
  const patches: unknown[] = [];
  vi.stubGlobal('fetch', async (address: string, init?: RequestInit) => {
    if (init?.method === 'PATCH') {
      patches.push(JSON.parse(String(init.body)));
      if (answers.refuse) {
        return Response.json({ error: { code: 'conflict', message: answers.refuse } }, { status: 409 });
      }
      return Response.json({ run: exampleRun() });
    }
    if (address.includes('/fleet')) {
      return Response.json({ redis: 'up', release: '0.1.0', serverThreads: 2, machines: [] });
    }
    return Response.json(answers.provenance ?? {});
  });
  return patches;
}

const show = (element: React.ReactNode) =>
  render(<SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>{element}</SWRConfig>);

describe('a run on the server', () => {
  it('says so, is paused by a word to the server, and may be helped from this browser', async () => {
    const patches = server();
    show(<RunPanel run={exampleRun({ state: 'running', place: 'server' })} points={points} driver={driver} />);
    expect(document.body.textContent).toContain('Runningon the server');
    fireEvent.click(screen.getByRole('button', { name: 'Pause' }));
    await waitFor(() => expect(patches).toEqual([{ state: 'paused' }]));
    fireEvent.click(screen.getByRole('button', { name: 'Help from this browser' }));
    expect(driver.start).toHaveBeenCalledOnce();
  });

  it('moves to another place between shards', async () => {
    const patches = server();
    show(<RestOfRun run={exampleRun({ state: 'running', place: 'server' })} />);
    fireEvent.change(screen.getByLabelText('The rest is computed'), { target: { value: 'browser' } });
    await waitFor(() => expect(patches).toEqual([{ place: 'browser' }]));
  });
});

describe('a finished run', () => {
  it('is extended to more errors or frames, never fewer', async () => {
    const patches = server();
    show(<RestOfRun run={exampleRun()} />);
    fireEvent.click(screen.getByRole('button', { name: 'Extend' }));
    const extend = screen.getAllByText('Extend').at(-1)! as HTMLButtonElement;
    expect(extend.closest('button')!.disabled).toBe(true);
    fireEvent.change(screen.getByLabelText('A point ends at frame errors'), { target: { value: '50' } });
    expect(document.body.textContent).toContain('a whole number from 100 to');
    fireEvent.change(screen.getByLabelText('A point ends at frame errors'), { target: { value: '400' } });
    fireEvent.click(extend);
    await waitFor(() => expect(patches).toEqual([{ extend: { frameErrors: 400 } }]));
  });

  it('says what the server refuses', async () => {
    server({ refuse: 'extend: not now.' });
    show(<RestOfRun run={exampleRun()} />);
    fireEvent.click(screen.getByRole('button', { name: 'Extend' }));
    fireEvent.change(screen.getByLabelText('or at frames'), { target: { value: '1e9' } });
    fireEvent.click(screen.getAllByText('Extend').at(-1)!);
    await screen.findByText('extend: not now.', { exact: false });
  });

  it('that is stopped, or planned its own frames, is not extended', () => {
    server();
    show(<RestOfRun run={exampleRun({ state: 'stopped' })} />);
    expect(screen.queryByRole('button', { name: 'Extend' })).toBeNull();
  });
});

describe('the goal of a run', () => {
  const goal = {
    ...{ kind: 'limit' as const, codeId: 'c', decoder: { kind: 'majority-logic' as const } },
    ...{ p: 0.001, rate: 'uber' as const, target: 1e-15, level: 0.95 },
  };

  it('is said in words', () => {
    expect(goalText(goal)).toBe('UBER ≤ 10⁻¹⁵ at p = 0.001, shown at 95\u202f%');
    const curves = [{ codeId: 'c', decoder: { kind: 'majority-logic' as const } }];
    expect(goalText({ kind: 'curve', curves, from: 0.02, to: 0.004, points: 12 })).toBe(
      '1 curve from p = 0.02 down to 0.004, at most 12 points each',
    );
  });

  it('stands with its verdict', () => {
    const outcome = { verdict: 'fail' as const, text: 'UBER is above 1e-15.' };
    render(<GoalBlock run={exampleRun({ goal, outcome })} />);
    expect(document.body.textContent).toMatch(/Goal: UBER ≤ .*Not kept.*UBER is above 1e-15\./);
  });
});

it('the sources of a run show what contradicts, what was set aside and who is in quarantine', async () => {
  const source = { shards: 12, frames: 24_000, recomputed: 1, quarantinedAt: null, quarantinedShards: 0 };
  const at = '2026-12-01T05:00:00.000Z';
  const { tally } = points[0]!;
  server({
    provenance: {
      sources: [
        { ...source, id: 's', kind: 'server', label: 'Server' },
        { ...source, id: 't', kind: 'browser', label: 'Tab', quarantinedAt: at, quarantinedShards: 12 },
      ],
      conflicts: [{ pointId: 'a', index: 3, at, stored: tally, posted: { ...tally, frameErrors: 7 } }],
      setAside: [{ pointId: 'a', index: 9, failures: 3, message: 'out of memory', at }],
    },
  });
  show(<SourceTables run={exampleRun()} points={points} />);
  await screen.findByText('Tab');
  const text = document.body.textContent;
  expect(text).toContain('in quarantine since 2026-12-01 05:00 UTC: 12 shards not counted');
  expect(text).toMatch(/1 contradiction.*Shard 3 at p = 0\.02: 500 frame errors stored, 7 handed in/);
  expect(text).toMatch(/1 shard set aside.*Shard 9 at p = 0\.02 failed 3 times: out of memory/);
});
