// The figures of the main road, in the built product: a plane of order 64 in a worker of the page, the page's own thread
// meanwhile, what a page weighs, and how long the second start takes.
import { spawn } from 'node:child_process';
import { performance } from 'node:perf_hooks';
import type { Page } from 'playwright-core';
import { launch, openProject, scriptBytes, signIn } from '../browser/bench.ts';
import { ensureBuilt, root, scratchDir, startServer } from '../server/built-server.ts';
import type { Row } from './row.ts';

/** From `npm start` to the line that says where it listens, on a machine where everything is there already. */
async function secondStartMs(): Promise<number> {
  const dataDir = scratchDir();
  const once = () =>
    new Promise<number>((resolve, reject) => {
      const from = performance.now();
      const env = { ...process.env, PORT: '0', DATA_DIR: dataDir };
      const child = spawn('npm', ['start'], { cwd: root, env, detached: true });
      child.stdout.on('data', (chunk: Buffer) => {
        if (!String(chunk).includes('listens on')) return;
        resolve(performance.now() - from);
        process.kill(-child.pid!, 'SIGTERM');
      });
      child.once('exit', (code) => reject(new Error(`npm start ended with ${code}`)));
    });
  await once();
  return once();
}

/** Milliseconds from the press of the button to the sheet, and the longest task of the page's thread meanwhile. */
async function buildInPage(page: Page, address: string): Promise<{ elapsedMs: number; longestTaskMs: number }> {
  await page.goto(address);
  await page.getByRole('region', { name: 'Prediction' }).getByText('3431').waitFor();
  await page.evaluate(() => {
    const seen: number[] = [0];
    Object.assign(window, { longTasks: seen });
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) seen.push(entry.duration);
    }).observe({ entryTypes: ['longtask'] });
  });
  const from = performance.now();
  await page.getByRole('button', { name: 'Build and verify' }).click();
  await page.locator('[data-built-code]').waitFor({ timeout: 60_000 });
  const elapsedMs = performance.now() - from;
  await page.locator('[data-matrix-canvas]').waitFor();
  await page.waitForTimeout(1500);
  const longestTaskMs = await page.evaluate(() =>
    Math.max(...(window as unknown as { longTasks: number[] }).longTasks),
  );
  return { elapsedMs, longestTaskMs };
}

export async function bench(): Promise<Row[]> {
  await ensureBuilt();
  const startMs = await secondStartMs();
  const server = await startServer();
  const browser = await launch();
  try {
    const context = await browser.newContext();
    const page = await context.newPage();
    await signIn(page, server.base, 'engineer');
    const project = `${server.base}/projects/${await openProject(page, server.base, 'Shore archive')}`;
    const rows: Row[] = [{ metric: 'npm start, the second time', value: startMs, unit: 'ms', must: 3000 }];
    const plane = `${project}/codes/new?family=projective-plane&q=64&checks=blocks`;
    const builds = [];
    for (let i = 0; i < 5; i++) builds.push(await buildInPage(page, plane));
    const middle = builds.map((build) => build.elapsedMs).sort((a, b) => a - b)[2]!;
    rows.push(
      { metric: 'PG(2,64) built, verified, ranked, analysed in a worker', value: middle, unit: 'ms', must: 2000 },
      {
        metric: 'longest task of the page’s thread meanwhile (0: none over 50 ms)',
        value: Math.max(...builds.map((build) => build.longestTaskMs)),
        unit: 'ms',
        must: 50,
      },
    );
    for (const place of ['requirements', 'candidates', 'codes', 'runs', 'compare'])
      rows.push({
        metric: `script of the page ${place}, compressed`,
        value: (await scriptBytes(context, `${project}/${place}`)) / 1000,
        unit: 'KB',
        must: 250,
      });
    return rows;
  } finally {
    await browser.close();
    await server.stop();
  }
}
