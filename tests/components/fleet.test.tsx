import { cleanup, render, screen } from '@testing-library/react';
import { SWRConfig } from 'swr';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Fleet } from '@/api/fleet.ts';
import FleetPage from '@/components/fleet/FleetPage.tsx';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

function show(fleet: Partial<Fleet>) {
  vi.stubGlobal('fetch', async () =>
    Response.json({ redis: 'off', release: '0.1.0', serverThreads: 2, machines: [], ...fleet }),
  );
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <FleetPage />
    </SWRConfig>,
  );
  return screen.findByText(/This server computes with/);
}

describe('the page of the fleet', () => {
  it('says how to add one where there is none', async () => {
    await show({});
    expect(screen.getByRole('heading', { name: 'Add a fleet' })).toBeTruthy();
    expect(document.body.textContent).toMatch(/2 threads.*REDIS_URL=redis.*npm run fleet/);
  });

  it('lists the machines, and those of another release as refused', async () => {
    const machine = { threads: 8, since: '2026-12-01T05:00:00.000Z', shards: 1200 };
    await show({
      redis: 'up',
      machines: [
        { ...machine, name: 'north', release: '0.1.0' },
        { ...machine, name: 'south', release: '0.0.9', shards: 0, refused: 'the server has 0.1.0' },
      ],
    });
    expect(screen.getAllByRole('row')).toHaveLength(3);
    expect(document.body.textContent).toMatch(/south.*0\.0\.9 refused: the server has 0\.1\.0/);
  });

  it('says what is lost while Redis does not answer: nothing', async () => {
    await show({ redis: 'down' });
    expect(document.body.textContent).toMatch(/Redis does not answer.*committed are safe/);
    expect(document.body.textContent).toContain('No machine has joined.');
  });
});
