// The matrix plot at its largest, in the built product: 16,513 × 16,513 from the whole to single cells and back, one gesture a
// frame. Headless Chromium draws in software; a machine with a graphics processor does no worse.
import type { Page } from 'playwright-core';
import { launch, signIn } from '../browser/bench.ts';
import { demoClient } from '../server/api-client.ts';
import { startServer } from '../server/built-server.ts';
import type { Row } from './row.ts';

interface Course {
  name: string;
  /** Milliseconds from each frame to the next. */
  intervals: number[];
  view: string;
}

/** What the renderer of the page takes of the processor while a course is run, whatever else the machine does. */
interface Driven extends Course {
  threadMsAFrame: number;
}

/** Keeps PG(2,128), and gives the address of its sheet. */
async function keepPlane(base: string): Promise<string> {
  const client = await demoClient(base, 'engineer');
  const { project } = (await client.post('/projects', { name: 'Plot' })).body;
  const design = { family: 'projective-plane', params: { q: 128 } };
  const made = await client.post(`/projects/${project.id}/codes`, {
    design,
    derivation: { kind: 'ldpc', checks: 'blocks' },
  });
  let id: string | undefined = made.body.code?.id;
  while (!id) {
    await new Promise((resolve) => setTimeout(resolve, 500));
    const { job } = (await client.get(`/jobs/${made.body.job.id}`)).body;
    if (job.state === 'failed') throw new Error(job.error.message);
    id = job.codeId ?? undefined;
  }
  return `${base}/projects/${project.id}/codes/${id}`;
}

const courses = {
  'zoom from the whole to single cells': 240,
  'pan among single cells': 120,
  'zoom half-way out': 110,
  'pan half-way out': 120,
  'zoom out to the whole': 140,
} as const;

/** Runs in the page: one gesture a frame, about a point off the middle. */
async function drive({ name, frames }: { name: string; frames: number }): Promise<Course> {
  const surface = document.querySelector<HTMLElement>('[role="application"]')!;
  const box = surface.getBoundingClientRect();
  const at = { clientX: box.left + box.width * 0.37, clientY: box.top + box.height * 0.61 };
  const act = (i: number) => {
    const side = ['ArrowRight', 'ArrowDown', 'ArrowLeft', 'ArrowUp'][Math.floor(i / 30) % 4]!;
    const event = name.startsWith('pan')
      ? new KeyboardEvent('keydown', { key: side, shiftKey: true, cancelable: true })
      : new WheelEvent('wheel', { deltaY: name.startsWith('zoom from') ? -20 : 20, ...at, cancelable: true });
    surface.dispatchEvent(event);
  };
  const frame = () => new Promise<number>((resolve) => requestAnimationFrame(resolve));
  const intervals: number[] = [];
  let before = await frame();
  for (let i = 0; i < frames; i++) {
    act(i);
    const now = await frame();
    intervals.push(now - before);
    before = now;
  }
  return { name, intervals, view: surface.parentElement!.querySelector('figcaption')!.textContent! };
}

async function measure(page: Page, address: string): Promise<Driven[]> {
  await page.goto(address);
  await page.locator('[data-matrix-canvas]').scrollIntoViewIfNeeded();
  await page.getByText('Shown: rows').waitFor({ timeout: 120_000 });
  await page.waitForTimeout(3000);
  // The TypeScript runner names functions by a helper that the page has not.
  await page.evaluate('globalThis.__name = (named) => named');
  const session = await page.context().newCDPSession(page);
  await session.send('Performance.enable', { timeDomain: 'threadTicks' });
  const threadMs = async () => {
    const { metrics } = await session.send('Performance.getMetrics');
    return 1000 * metrics.find(({ name }) => name === 'TaskDuration')!.value;
  };
  const driven: Driven[] = [];
  for (const [name, frames] of Object.entries(courses)) {
    const before = await threadMs();
    const course = await page.evaluate(drive, { name, frames });
    driven.push({ ...course, threadMsAFrame: ((await threadMs()) - before) / frames });
  }
  return driven;
}

export async function bench(): Promise<Row[]> {
  const server = await startServer();
  const browser = await launch();
  try {
    const address = await keepPlane(server.base);
    const rows: Row[] = [];
    for (const deviceScaleFactor of [1, 2]) {
      const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, deviceScaleFactor });
      const page = await context.newPage();
      await signIn(page, server.base, 'engineer');
      const courses = await measure(page, address);
      rows.push(...courses.flatMap((course) => rowsOf(course, deviceScaleFactor)));
      await context.close();
    }
    return rows;
  } finally {
    await browser.close();
    await server.stop();
  }
}

function rowsOf({ name, intervals, view, threadMsAFrame }: Driven, ratio: number): Row[] {
  const total = intervals.reduce((sum, interval) => sum + interval, 0);
  const late = intervals.filter((interval) => interval > 25).length;
  const shown = /Shown: (.*?), counted/.exec(view)?.[1] ?? '';
  const longest = Math.max(...intervals).toFixed(0);
  const what = `${name}, ${ratio} × pixels`;
  return [
    {
      metric: `${what}: frames a second`,
      value: (1000 * intervals.length) / total,
      unit: 'frames/s',
      must: 59,
      better: 'higher',
      note: `in software; ${late} of ${intervals.length} frames missed, longest ${longest} ms; ends at ${shown}`,
    },
    {
      metric: `${what}: processor time of the page’s thread a frame`,
      value: threadMsAFrame,
      unit: 'ms',
      must: 16.7,
    },
  ];
}
