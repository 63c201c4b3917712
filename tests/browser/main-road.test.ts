import { readFileSync } from 'node:fs';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { importMatrix } from '@/core/formats/index.ts';
import { type RunningServer, startServer } from '../server/built-server.ts';
import { complaintsOf, hydrated, launch, openProject, scriptBytes, signIn } from './bench.ts';

let server: RunningServer;
let browser: Browser;
let context: BrowserContext;
let page: Page;
let complaints: string[];
let projectId: string;
let codeId: string;
let runAddress: string;

beforeAll(async () => {
  server = await startServer();
  browser = await launch();
  context = await browser.newContext({ viewport: { width: 1280, height: 900 }, acceptDownloads: true });
  page = await context.newPage();
  complaints = complaintsOf(page);
}, 240_000);

afterAll(async () => {
  await browser?.close();
  await server?.stop();
});

const address = (rest: string) => `${server.base}/projects/${projectId}/${rest}`;

/** Text of a page, with the thin spaces of long numbers taken out. */
const textOf = async (where: Page, selector = 'main') =>
  ((await where.locator(selector).innerText()) ?? '').replace(/[\u2009\u202f]/g, '');

test('1. a visitor who is not signed in is sent to the sign-in page; a wrong password says no more than that', async () => {
  await page.goto(`${server.base}/`);
  expect(new URL(page.url()).pathname).toBe('/sign-in');
  await hydrated(page);
  await page.getByLabel('e-mail').fill('engineer@demo.test');
  await page.getByLabel('password', { exact: true }).fill('not this');
  await page.getByRole('button', { name: 'Sign in' }).click();
  const alert = page.getByRole('alert').first();
  await alert.waitFor();
  expect(await alert.innerText()).not.toMatch(/password is wrong|unknown|no such|account does not/i);
  complaints.length = 0;
});

test('1. the engineer signs in, opens "Shore archive" and reads its requirements', async () => {
  await signIn(page, server.base, 'engineer');
  projectId = await openProject(page, server.base, 'Shore archive');
  await page.goto(address('requirements'));
  const text = await textOf(page);
  expect(text).toContain('p = 0.004');
  expect(text).toContain('200 to 4200');
});

test('2. parameters are predicted before building, and impossible ones are refused by theorem or rule', async () => {
  await page.goto(address('codes/new?family=projective-plane&q=6&checks=blocks'));
  await page.getByText('Bruck–Ryser').first().waitFor();
  await page.goto(address('codes/new?family=steiner-triple&v=8&method=bose&checks=points'));
  await page
    .getByText(/divisibility/)
    .first()
    .waitFor();
  await page.goto(address('codes/new?family=projective-plane&q=64&checks=blocks'));
  await page.getByRole('region', { name: 'Prediction' }).getByText('3431').waitFor();
  const prediction = await textOf(page, 'section[aria-label="Prediction"]');
  expect(prediction).toMatch(/Distance\s+66\s+proved/);
});

test('3. PG(2,64) is built, verified and analysed in a worker while the page never stops for 50 ms', async () => {
  const longest: number[] = [];
  // Other programs on the machine can only lengthen a task, so the best of three builds is what the page does of itself.
  for (let build = 0; build < 3 && !(Math.min(...longest) <= 50); build++) {
    if (build > 0) {
      await page.reload();
      await page.getByRole('region', { name: 'Prediction' }).getByText('3431').waitFor();
    }
    await page.evaluate(() => {
      const seen: number[] = [0];
      Object.assign(window, { longTasks: seen });
      new PerformanceObserver((list) => {
        for (const entry of list.getEntries()) seen.push(entry.duration);
      }).observe({ entryTypes: ['longtask'] });
    });
    await page.getByRole('button', { name: 'Build and verify' }).click();
    // The matrix plot draws a quarter of a million ones; it is part of what must not freeze the page.
    await page.locator('[data-built-code] [data-matrix-canvas]').waitFor({ timeout: 30_000 });
    await page.waitForTimeout(1500);
    longest.push(await page.evaluate(() => Math.max(...(window as unknown as { longTasks: number[] }).longTasks)));
  }
  const built = await textOf(page, '[data-built-code]');
  expect(built).toContain('(4161, 3431)');
  expect(built).toMatch(/Rank over GF\(2\)\s+730\s+computed/);
  expect(built).toMatch(/8654880/);
  expect(Math.min(...longest), `longest tasks of the builds: ${longest.join(', ')} ms`).toBeLessThanOrEqual(50);
});

test('3. PG(2,16) has n = 273 and k = 191 and the punctured affine plane of order 32 has n = 1023 and k = 781', async () => {
  await page.goto(address('codes'));
  await page.getByRole('link', { name: 'Projective q = 16' }).waitFor();
  const text = await textOf(page);
  expect(text).toMatch(/273\s+191/);
  expect(text).toMatch(/1023\s+781/);
});

test('3. a triple system is built, kept, and shown with its certificate and every property graded', async () => {
  await page.goto(address('codes/new?family=steiner-triple&v=31&method=skolem&checks=points'));
  await page.getByRole('button', { name: 'Build and verify' }).click();
  await page.locator('[data-built-code]').waitFor();
  await page.getByLabel('name (optional)').fill('Triples on 31 points');
  await page.getByRole('button', { name: 'Keep in this project' }).click();
  await page.waitForURL(/\/codes\/(?!new)[^/]+$/);
  codeId = new URL(page.url()).pathname.split('/')[4]!;
  const text = await textOf(page);
  expect(text).toContain('155');
  const grades = await page.locator('[data-grade]').count();
  expect(grades).toBeGreaterThanOrEqual(10);
});

test('3. the matrix is drawn on a canvas that zooms to single cells by keyboard', async () => {
  const canvas = page.locator('[data-matrix-canvas]');
  await canvas.scrollIntoViewIfNeeded();
  await canvas.waitFor();
  const inked = () =>
    canvas.evaluate((element: HTMLCanvasElement) => {
      const { data } = element.getContext('2d')!.getImageData(0, 0, element.width, element.height);
      const shades = new Set<number>();
      for (let i = 0; i < data.length; i += 4) shades.add((data[i]! << 16) | (data[i + 1]! << 8) | data[i + 2]!);
      return shades.size;
    });
  await expect.poll(inked, { timeout: 10_000 }).toBeGreaterThan(1);
});

test('4. a run over the binary symmetric channel is stated: two codes, four decoders, bad input named', async () => {
  await page.goto(address('runs/new'));
  await hydrated(page);
  await page.getByRole('checkbox', { name: /Projective q = 16/ }).check();
  await page.getByRole('checkbox', { name: /Triples on 31 points/ }).check();
  for (const decoder of [/parallel bit flipping/, /one-step majority/, /^sum-product/])
    await page.getByRole('checkbox', { name: decoder }).check();
  await page.getByLabel('From p').fill('0.7');
  await page.getByRole('button', { name: 'State the run' }).click();
  await page
    .getByText(/Not accepted/)
    .filter({ visible: true })
    .first()
    .waitFor();
  await page.getByLabel('From p').fill('0.02');
  await page.getByLabel('To p').fill('0.01');
  await page.getByLabel('Points', { exact: true }).fill('2');
  await page.getByLabel('A point ends at frame errors').fill('300');
  await page.getByLabel('or at frames').fill('40000');
  await page.getByLabel('Frames per shard').fill('1000');
  await page.getByLabel('Seed').fill('browser walk');
  await page.getByRole('button', { name: 'State the run' }).click();
  await page.waitForURL(/\/runs\/(?!new)[^/]+$/);
  runAddress = page.url();
});

test('4. it starts, shows progress and a growing curve, pauses and resumes', async () => {
  await hydrated(page);
  await page.getByRole('button', { name: 'Start' }).click();
  await page.getByRole('button', { name: 'Pause' }).waitFor();
  await expect.poll(() => page.locator('[data-point]').count(), { timeout: 30_000 }).toBeGreaterThan(0);
  await page.getByRole('button', { name: 'Pause' }).click();
  await page.getByRole('button', { name: 'Resume' }).waitFor();
  await page.getByRole('button', { name: 'Resume' }).click();
  await page.getByRole('button', { name: 'Pause' }).waitFor();
});

interface RunAnswer {
  run: { state: string; frames: number };
  points: { tally: { frames: number; frameErrors: number }; interval: { lower: number; upper: number }; fer: number }[];
}
const runState = async () =>
  (await (await context.request.get(`${server.base}/api/v1/runs/${runAddress.split('/').at(-1)}`)).json()) as RunAnswer;

test('5. the tab is closed in the middle; coming back, every acknowledged shard is there and the run goes on to its end', async () => {
  await page.close();
  const before = (await runState()).run.frames;
  expect(before).toBeGreaterThan(0);
  page = await context.newPage();
  complaints = complaintsOf(page);
  await page.goto(runAddress);
  await hydrated(page);
  expect((await runState()).run.frames).toBeGreaterThanOrEqual(before);
  await page.getByRole('button', { name: /Go on here|Resume/ }).click();
  await expect.poll(async () => (await runState()).run.state, { timeout: 120_000, interval: 500 }).toBe('finished');
  const { points } = await runState();
  expect(points).toHaveLength(16);
  for (const { tally, fer, interval } of points) {
    expect(tally.frameErrors >= 300 || tally.frames >= 40_000).toBe(true);
    expect(interval.lower).toBeLessThanOrEqual(fer);
    expect(interval.upper).toBeGreaterThanOrEqual(fer);
  }
});

test('6. curves of two codes lie on one chart with the uncoded line, and a table reads the same figures', async () => {
  await page.goto(address('compare'));
  await page.locator('[data-curve]').first().waitFor({ timeout: 20_000 });
  const boxes = page.getByRole('checkbox');
  for (let i = 0; i < (await boxes.count()); i++) await boxes.nth(i).check();
  await expect.poll(() => page.locator('[data-curve]').count()).toBeGreaterThan(3);
  expect(await page.locator('[data-uncoded]').count()).toBeGreaterThan(0);
  const text = await textOf(page);
  expect(text).toContain('(155,');
  expect(text).toContain('(273,191)');
  await page.reload();
  await expect.poll(() => page.locator('[data-curve]').count(), { timeout: 20_000 }).toBeGreaterThan(3);
});

test('7. the matrix is exported as alist and Matrix Market, with a manifest that names its fingerprint and digests', async () => {
  await page.goto(address(`codes/${codeId}`));
  const fetched: Record<string, Uint8Array> = {};
  for (const label of ['alist', 'Matrix Market', 'manifest']) {
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: label, exact: true }).click(),
    ]);
    fetched[label] = readFileSync(await download.path());
  }
  const alist = importMatrix(fetched.alist!, 'alist');
  const market = importMatrix(fetched['Matrix Market']!, 'mtx');
  expect([alist.rows, alist.cols]).toEqual([31, 155]);
  expect([...market.colIndex]).toEqual([...alist.colIndex]);
  const manifest = JSON.parse(new TextDecoder().decode(fetched.manifest)) as { fingerprint: string };
  expect(manifest.fingerprint).toBe(await page.locator('[data-fingerprint]').getAttribute('data-fingerprint'));
  const digest = Buffer.from(await crypto.subtle.digest('SHA-256', new Uint8Array(fetched.alist!))).toString('hex');
  expect(JSON.stringify(manifest)).toContain(digest);
});

test('the project page takes less than 250 KB of script over the wire', async () => {
  for (const place of ['requirements', 'codes', 'compare', 'candidates'])
    expect([place, (await scriptBytes(context, address(place))) < 250_000]).toEqual([place, true]);
});

test('no page complained on the way', () => {
  expect(complaints).toEqual([]);
});

test('8. the engineer signs out; the viewer sees the same and can change nothing, by the server’s word', async () => {
  await page.getByRole('button', { name: 'Sign out' }).click();
  await page.waitForURL(/\/sign-in/);
  await signIn(page, server.base, 'viewer');
  await page.goto(address(`codes/${codeId}`));
  expect(await textOf(page)).toContain('Triples on 31 points');
  await page.goto(runAddress);
  await page.locator('[data-curve]').first().waitFor();
  expect(await page.getByRole('button', { name: /^(Start|Resume|Pause|Stop|Go on here)$/ }).count()).toBe(0);
  const headers = { origin: server.base };
  const runId = runAddress.split('/').at(-1);
  const refused = [
    await context.request.patch(`${server.base}/api/v1/runs/${runId}`, { headers, data: { state: 'running' } }),
    await context.request.delete(`${server.base}/api/v1/codes/${codeId}`, { headers }),
    await context.request.put(`${server.base}/api/v1/projects/${projectId}/requirements`, {
      headers,
      data: { targetFer: 0.001 },
    }),
    await context.request.post(`${server.base}/api/v1/projects/${projectId}/codes`, {
      headers,
      data: {
        design: { family: 'projective-plane', params: { q: 4 } },
        derivation: { kind: 'ldpc', checks: 'blocks' },
      },
    }),
  ];
  expect(refused.map((response) => response.status())).toEqual([403, 403, 403, 403]);
});
