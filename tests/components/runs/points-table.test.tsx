import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { groupPoints } from '@/client/curves/group-points.ts';
import { chartCurves } from '@/components/charts/chart-curve.ts';
import { histogramBars, histogramSentence } from '@/components/charts/histogram-bars.ts';
import { PointsTable } from '@/components/runs/PointsTable.tsx';
import { examplePoint } from '../example-points.ts';

afterEach(cleanup);

const stopping = { frameErrors: 100, maxFrames: 1_000_000 };

function table(points: Parameters<typeof PointsTable>[0]['points'], onSelect = vi.fn(), omitted = 0) {
  const curves = chartCurves(groupPoints(points));
  const rest = { curves, stopping, seed: 's', selectedId: null, onSelect };
  render(<PointsTable runId="r" points={points} omitted={omitted} {...rest} />);
  return onSelect;
}

describe('the table of points', () => {
  it('gives a bound where no error was seen, marks it thin, and prints no probability as 0', () => {
    table([examplePoint({ frames: 1_000_000, frameErrors: 0, done: true })]);
    const row = screen.getAllByRole('row')[1]!;
    expect(row.textContent).toMatch(/<.4\.6.×.10−6/);
    expect(row.textContent).toContain('thin');
    expect(row.textContent).toContain('sampled');
    expect(row.textContent).toContain('done, at the cap on frames');
  });

  it('says which points wait and which are under way', () => {
    table([examplePoint({ id: 'a', frames: 0, frameErrors: 0 }), examplePoint({ id: 'b', p: 0.01 })]);
    expect(screen.getAllByRole('row')[1]?.textContent).toContain('waiting');
    expect(screen.getAllByRole('row')[2]?.textContent).toContain('under way');
  });

  it('chooses a point for its iterations', () => {
    const onSelect = table([examplePoint({ id: 'a', p: 0.015 })]);
    fireEvent.click(screen.getByRole('button', { name: '0.015' }));
    expect(onSelect).toHaveBeenCalledWith('a');
  });

  it('shows the first hundred of many, and more when asked', { timeout: 30_000 }, () => {
    table(Array.from({ length: 120 }, (_, i) => examplePoint({ id: `${i}`, p: 0.001 + i * 1e-5 })));
    expect(document.querySelectorAll('tbody tr')).toHaveLength(100);
    fireEvent.click(screen.getByText('Show more'));
    expect(document.querySelectorAll('tbody tr')).toHaveLength(120);
  });
});

it('the table of a run of very many points fetches its rows page by page, in the run’s order', async () => {
  const all = Array.from({ length: 150 }, (_, i) => examplePoint({ id: `${i}`, p: 0.05 - i * 1e-4 }));
  const asked: string[] = [];
  vi.stubGlobal('fetch', async (address: string) => {
    asked.push(address);
    const from = Number(/after=(\d+)/.exec(address)?.[1] ?? -1) + 1;
    const next = from + 100 < all.length ? { next: `${from + 99}` } : {};
    return Response.json({ points: all.slice(from, from + 100), ...next });
  });
  table([all[0]!, all[149]!], vi.fn(), 148);
  await waitFor(() => expect(document.querySelectorAll('tbody tr')).toHaveLength(100));
  expect(document.body.textContent).toContain('The first 100 of 150 points.');
  fireEvent.click(screen.getByText('Show more'));
  await waitFor(() => expect(document.querySelectorAll('tbody tr')).toHaveLength(150));
  expect(asked).toHaveLength(2);
  vi.unstubAllGlobals();
}, 30_000);

describe('the histogram of iterations', () => {
  it('leaves empty bars out of the logarithmic axis', () => {
    expect(histogramBars([5, 0, 2])).toEqual([
      { label: '0', frames: 5 },
      { label: '1', frames: null },
      { label: '2', frames: 2 },
    ]);
  });

  it('joins neighbours to at most sixty bars and loses no frame', () => {
    const bars = histogramBars(Array.from({ length: 1001 }, () => 1));
    expect(bars.length).toBeLessThanOrEqual(60);
    expect(bars.reduce((sum, bar) => sum + (bar.frames ?? 0), 0)).toBe(1001);
  });

  it('is said in a sentence', () => {
    expect(histogramSentence([2, 6, 1, 0, 1])).toBe('Of 10 frames, half ended within 1 iteration; 1 frame took 4.');
  });
});
