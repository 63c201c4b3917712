import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { idsToChart, mostPointsGiven } from '@/server/use-cases/runs/charted-points.ts';
import { listRunPoints } from '@/server/use-cases/runs/list-run-points.ts';
import { projectPoints } from '@/server/use-cases/runs/project-points.ts';
import { type Bench, openBench } from './scheduling-kit.ts';

const count = 5000;
const crossover = (i: number) => 0.1 * 0.999 ** i;

let bench: Bench;
let runId: string;
beforeAll(async () => {
  bench = await openBench();
  const run = await bench.state({
    points: Array.from({ length: count }, (_, i) => ({
      channel: { kind: 'bsc' as const, p: crossover(i) },
      decoder: { kind: 'majority-logic' as const },
    })),
  });
  runId = run.id;
  const { db } = bench.context;
  // A waterfall, above it one point alone, and the last thousand without an error.
  await db('points').where({ run_id: runId }).update({ frames: 1000, bits: 21_000 });
  await db.raw('UPDATE points SET frame_errors = max(1, 900 - position / 5) WHERE run_id = ? AND position < 4000', [
    runId,
  ]);
  await db('points').where({ run_id: runId, position: 2345 }).update({ frame_errors: 1000 });
}, 60_000);
afterAll(() => bench.close());

describe('a run of thousands of points', () => {
  it('is given with those that its chart needs: ends, extremes, and points without errors', async () => {
    const { run, points, omitted } = await bench.seen(runId);
    expect(run.pointCount).toBe(count);
    expect(points.length).toBeLessThanOrEqual(mostPointsGiven);
    expect(points.length + omitted).toBe(count);
    const ps = points.map(({ channel }) => (channel.kind === 'bsc' ? channel.p : 0));
    for (const i of [0, 2345, count - 1]) expect(ps).toContain(crossover(i));
    expect(points.some(({ tally }) => tally.frameErrors === 0)).toBe(true);
    // In the order of the run.
    expect(ps).toEqual([...ps].sort((a, b) => b - a));
  });

  it('is listed whole, page by page', async () => {
    const seen: string[] = [];
    for (let after: string | undefined, more = true; more; ) {
      const page = await listRunPoints(bench.context, runId, { limit: 500, ...(after && { after }) });
      seen.push(...page.points.map(({ id }) => id));
      after = page.points.at(-1)?.id;
      more = page.next !== undefined;
    }
    expect(new Set(seen).size).toBe(count);
  });

  it('does not drown the project’s other curves', async () => {
    const other = await bench.state({
      points: [{ channel: { kind: 'bsc', p: 0.03 }, decoder: { kind: 'gallager-b' } }],
    });
    await bench.context.db('points').where({ run_id: other.id }).update({ frames: 10, frame_errors: 3 });
    const { points, omitted } = await projectPoints(bench.context, bench.projectId, {});
    expect(points.filter((point) => point.runId === other.id)).toHaveLength(1);
    expect(points.length + omitted).toBe(count + 1);
  });
});

it('points of a channel that is measured in decibels are thinned along them too', async () => {
  const other = await openBench();
  const run = await other.state({
    points: Array.from({ length: 2500 }, (_, i) => ({
      channel: { kind: 'awgn' as const, ebn0Db: -2 + i / 250 },
      decoder: { kind: 'sum-product' as const },
    })),
  });
  const { db } = other.context;
  await db('points').where({ run_id: run.id }).update({ frames: 1000, bits: 21_000 });
  await db.raw('UPDATE points SET frame_errors = max(1, 900 - position / 3) WHERE run_id = ?', [run.id]);
  const { points } = await other.seen(run.id);
  const levels = points.map(({ channel }) => (channel.kind === 'awgn' ? channel.ebn0Db : Number.NaN));
  expect([Math.min(...levels), Math.max(...levels)]).toEqual([-2, 7.996]);
  expect(points.length).toBeGreaterThan(300);
  await other.close();
});

it('every curve keeps its marks however many curves there are', () => {
  const outlines = Array.from({ length: 3000 }, (_, i) => ({
    ...{ id: `${i}`, curve: `${i % 1500}`, x: i < 1500 ? 0.1 : 0.01, frames: 10, frameErrors: 1 },
  }));
  expect(idsToChart(outlines, 2000)).toHaveLength(3000);
});
