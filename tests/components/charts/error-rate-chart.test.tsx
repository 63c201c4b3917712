import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import type { Point } from '@/api/runs.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { chartCurves } from '@/components/charts/chart-curve.ts';
import { ErrorRateChart, type ErrorRateChartProps } from '@/components/charts/error-rate-chart/ErrorRateChart.tsx';
import { examplePoint } from '../example-points.ts';

afterEach(cleanup);

function show(points: Point[], more: Partial<ErrorRateChartProps> = {}) {
  const props: ErrorRateChartProps = {
    title: 'Frame error rate, planes of order 16',
    curves: chartCurves(groupPoints(points)),
    kind: 'fer',
    onKind: vi.fn(),
    hidden: new Set(),
    onToggle: vi.fn(),
    zoom: null,
    onZoom: vi.fn(),
    intervalMethod: 'Clopper–Pearson',
    provenance: 'Computed by Blockwright.',
    ...more,
  };
  const { container } = render(<ErrorRateChart {...props} />);
  return { container, props, svg: container.querySelector('svg[role="img"]')! };
}

const threePoints = [
  examplePoint({ p: 0.03, frameErrors: 3000 }),
  examplePoint({ p: 0.02, frameErrors: 50 }),
  examplePoint({ p: 0.01, frames: 1_000_000, frameErrors: 0 }),
];

describe('the error-rate chart', () => {
  it('draws firm points, thin points and points without an error each in their way', () => {
    const { svg } = show(threePoints);
    expect(svg.querySelectorAll('[data-point="firm"]')).toHaveLength(1);
    expect(svg.querySelectorAll('[data-point="thin"]')).toHaveLength(1);
    expect(svg.querySelectorAll('[data-bound]')).toHaveLength(1);
  });

  it.each([
    ['no point', []],
    ['a point without frames', [examplePoint({ frames: 0, frameErrors: 0 })]],
    ['a single point', [examplePoint({})]],
    [
      'only points without errors',
      [examplePoint({ p: 0.02, frameErrors: 0 }), examplePoint({ p: 0.01, frameErrors: 0 })],
    ],
    ['only failed frames', [examplePoint({ frames: 10, frameErrors: 10 })]],
  ])('draws %s without a gap in its numbers', (_, points) => {
    const { svg } = show(points);
    expect(svg.outerHTML).not.toMatch(/NaN|Infinity|undefined/);
  });

  it('draws a hundred thousand points with a few thousand elements', () => {
    const points = Array.from({ length: 100_000 }, (_, i) =>
      examplePoint({ id: `p${i}`, p: 0.05 * Math.exp(-i / 40_000), frameErrors: i % 400 === 399 ? 0 : 1 + (i % 97) }),
    );
    const { svg } = show(points);
    expect(svg.querySelectorAll('*').length).toBeLessThan(3000);
    expect(svg.querySelectorAll('[data-bound]').length).toBeGreaterThan(0);
  });

  it('tells its content to those who do not see it', () => {
    const { svg } = show(threePoints);
    expect(svg.querySelector('title')?.textContent).toBe('Frame error rate, planes of order 16');
    expect(svg.querySelector('desc')?.textContent).toMatch(
      /\(273,191\) Gallager B \(solid\): 3 points, from 0\.30 at p = 0\.03 to <.4\.6.×.10⁻⁶ at p = 0\.01/,
    );
  });

  it('shades what lies beyond the last point as not measured', () => {
    const { svg, container } = show(threePoints);
    expect(Number(svg.querySelector('[data-unmeasured] rect')?.getAttribute('width'))).toBeGreaterThan(20);
    expect(container.textContent).toContain('shaded: not measured');
  });

  it('marks the requirement of the rate that is shown', () => {
    const requirement = {
      kind: 'fer',
      target: 1e-3,
      p: 0.012,
      label: 'required: FER ≤ 10⁻³',
      shortLabel: 'FER',
    } as const;
    expect(show(threePoints, { requirement }).svg.textContent).toContain('required: FER ≤ 10⁻³');
    cleanup();
    expect(show(threePoints, { requirement, kind: 'ber' }).svg.textContent).not.toContain('required');
  });

  it('says so when a required rate lies below the chart', () => {
    const requirement = { kind: 'fer', target: 1e-14, p: 0.012, label: 'required: x', shortLabel: 'x' } as const;
    expect(show(threePoints, { requirement }).svg.textContent).toContain('required: x, below this chart');
  });

  it('is walked with the arrow keys, which speak each point', () => {
    const onChoose = vi.fn();
    show(threePoints, { onChoose });
    const chart = screen.getByRole('group', { name: /Arrow keys/ });
    fireEvent.keyDown(chart, { key: 'ArrowRight' });
    expect(screen.getByRole('status').textContent).toMatch(/p = 0\.03, FER 0\.300.*3000 frame errors/);
    fireEvent.keyDown(chart, { key: 'ArrowRight' });
    expect(screen.getByRole('status').textContent).toMatch(/p = 0\.02.*50 frame errors in 10.000 frames, thin/);
    fireEvent.keyDown(chart, { key: 'End' });
    expect(screen.getByRole('status').textContent).toMatch(/p = 0\.01, FER <.4\.60.×.10⁻⁶/);
    expect(onChoose).toHaveBeenLastCalledWith('point-0.01');
    fireEvent.keyDown(chart, { key: 'Escape' });
    expect(screen.getByRole('status').textContent).toBe('');
  });

  it('goes from curve to curve with up and down', () => {
    show([...threePoints, examplePoint({ id: 'other', p: 0.021, decoder: { kind: 'majority-logic' } })]);
    const chart = screen.getByRole('group', { name: /Arrow keys/ });
    for (const key of ['ArrowRight', 'ArrowRight', 'ArrowDown']) fireEvent.keyDown(chart, { key });
    expect(screen.getByRole('status').textContent).toMatch(/one-step: at p = 0\.021/);
  });

  it('zooms by key and by button, and shows everything again', () => {
    const { props } = show(threePoints, { zoom: { pMax: 0.03, pMin: 0.01, top: 0.1, bottom: 1e-4 } });
    fireEvent.keyDown(screen.getByRole('group', { name: /Arrow keys/ }), { key: '+' });
    fireEvent.click(screen.getByRole('button', { name: 'Zoom in' }));
    expect(props.onZoom).toHaveBeenCalledTimes(2);
    fireEvent.click(screen.getByRole('button', { name: 'Whole chart' }));
    expect(props.onZoom).toHaveBeenLastCalledWith(null);
  });

  it('shows and hides curves from its legend', () => {
    const { props, svg } = show(threePoints);
    const button = screen.getByRole('button', { name: /Gallager B/ });
    expect(button.getAttribute('aria-pressed')).toBe('true');
    fireEvent.click(button);
    expect(props.onToggle).toHaveBeenCalledWith(props.curves[0]?.curve.key);
    expect(svg.querySelectorAll('[data-curve]')).toHaveLength(1);
    cleanup();
    const hidden = show(threePoints, { hidden: new Set([props.curves[0]!.curve.key]) });
    expect(hidden.svg.querySelectorAll('[data-curve]')).toHaveLength(0);
    expect(hidden.svg.textContent).toContain('Every curve is hidden.');
  });

  it('states the uncoded reference for the rate shown', () => {
    expect(show(threePoints).container.textContent).toContain('FER = 1 − (1 − p)ⁿ');
    cleanup();
    expect(show(threePoints, { kind: 'ber' }).container.textContent).toContain('BER = p');
  });

  it('switches between frames and bits', () => {
    const { props } = show(threePoints);
    fireEvent.click(screen.getByRole('radio', { name: 'BER' }));
    expect(props.onKind).toHaveBeenCalledWith('ber');
  });
});
