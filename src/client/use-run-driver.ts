import { useEffect, useMemo, useRef, useState } from 'react';
import { useSWRConfig } from 'swr';
import type { Code } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import type { Point, Run } from '@/api/runs.ts';
import { addressOf, call } from './api.ts';
import { type DriverView, RunDriver } from './run-driver.ts';
import { createSimulationPool } from './simulation-pool.ts';
import { defaultPoolSize } from './worker-pool.ts';

export type { DriverView } from './run-driver.ts';

export interface RunDriverHandle extends DriverView {
  start(): void;
  pause(): void;
  resume(): void;
  stop(): void;
}

/** Drives a run in this page. Nothing is fetched or computed before `start` or `resume`; leaving the page lets go. */
export function useRunDriver(run: Run, points: Point[]): RunDriverHandle {
  const { mutate } = useSWRConfig();
  const driver = useRef<{ run: RunDriver; close(): void } | null>(null);
  const [view, setView] = useState<DriverView>(() => idleView(run, points));
  const latest = useRef({ run, points });
  latest.current = { run, points };

  useEffect(() => () => driver.current?.close(), []);

  return useMemo(() => {
    const begin = async () => {
      driver.current?.close();
      driver.current = await createDriver(latest.current.run, latest.current.points, setView);
      await driver.current.run.start();
    };
    const refresh = () => mutate(addressOf(endpoints.getRun, { params: { id: latest.current.run.id } }));
    const start = () =>
      void begin().catch((error: Error) => setView((v) => ({ ...v, status: 'failed', message: error.message })));
    return {
      ...view,
      start,
      resume: start,
      pause: () => void driver.current?.run.pause().then(refresh),
      stop: () => void stopRun(driver.current?.run ?? null, latest.current.run.id).then(refresh),
    };
  }, [view, mutate]);
}

async function createDriver(run: Run, points: Point[], onView: (view: DriverView) => void) {
  const ids = [...new Set(points.map((point) => point.codeId))];
  const codes = await Promise.all(ids.map((id) => call(endpoints.getCode, { params: { id } })));
  const pool = createSimulationPool(run, new Map(codes.map(({ code }): [string, Code] => [code.id, code])));
  const source = { name: tabName(), label: browserLabel() };
  const driver = new RunDriver(run, points, {
    workers: pool.size,
    compute: (point, index, signal) => pool.shard(point, index, signal),
    lease: (count) => call(endpoints.leaseShards, { params: { id: run.id }, body: { count, source } }),
    failed: (failure) => call(endpoints.failShards, { params: { id: run.id }, body: { failures: [failure], source } }),
    post: (shards) => call(endpoints.postShards, { params: { id: run.id }, body: { shards, source } }),
    setState: async (state) => void (await call(endpoints.patchRun, { params: { id: run.id }, body: { state } })),
    now: () => performance.now(),
    wait: (ms) => new Promise((done) => setTimeout(done, ms)),
    onView,
  });
  return {
    run: driver,
    close() {
      driver.dispose();
      pool.close();
    },
  };
}

/** This tab's name as a source, the same as long as it lives. */
function tabName(): string {
  const known = sessionStorage.getItem('source');
  if (known) return known;
  const name = `tab ${crypto.randomUUID()}`;
  sessionStorage.setItem('source', name);
  return name;
}

/** "Firefox 140 on Linux", as far as the browser says. */
function browserLabel(): string {
  const agent = navigator.userAgent;
  const [, name = 'a browser', version = ''] = /(Firefox|Edg|Chrome|Version)\/(\d+)/.exec(agent) ?? [];
  const [system = ''] = /Windows|Android|iPhone|iPad|Mac OS X|Linux/.exec(agent) ?? [];
  const shown = { Edg: 'Edge', Version: 'Safari', Chrome: 'Chromium' }[name] ?? name;
  return [shown, version, system && `on ${system}`].filter(Boolean).join(' ');
}

/** A run that this page is not working on is stopped by a word to the server. */
async function stopRun(driver: RunDriver | null, runId: string): Promise<void> {
  if (driver) await driver.stop();
  else await call(endpoints.patchRun, { params: { id: runId }, body: { state: 'stopped' } });
}

function idleView(run: Run, points: Point[]): DriverView {
  const never = () => Promise.reject(new Error('not started'));
  const ports = {
    workers: defaultPoolSize(),
    lease: never,
    failed: never,
    compute: never,
    post: never,
    setState: never,
    now: () => 0,
    wait: never,
    onView() {},
  };
  return new RunDriver(run, points, ports).view();
}
