import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { groupPoints } from '@/client/curves/group-points.ts';
import {
  lastMeasured,
  magnify,
  parseWindow,
  wholeWindow,
  windowText,
} from '@/components/charts/error-rate-chart/domain.ts';
import { chartFrame } from '@/components/charts/error-rate-chart/frame.ts';
import { curveMarks } from '@/components/charts/error-rate-chart/marks.ts';
import { spreadLabels, type WantedLabel } from '@/components/charts/error-rate-chart/spread-labels.ts';
import { channelTicks, rateTicks } from '@/components/charts/error-rate-chart/ticks.ts';
import { windowOfBox } from '@/components/charts/error-rate-chart/use-drag-zoom.ts';
import { examplePoint } from '../example-points.ts';

const window = { pMax: 0.05, pMin: 0.005, top: 1, bottom: 1e-5 };

describe('the window of a chart', () => {
  it('holds all points, and reaches whole decades', () => {
    const curves = groupPoints([examplePoint({ p: 0.03 }), examplePoint({ p: 0.01, frames: 1e6, frameErrors: 700 })]);
    const whole = wholeWindow({ curves, kind: 'fer' });
    expect(whole.pMax).toBeGreaterThan(0.03);
    expect(whole.pMin).toBeLessThan(0.01);
    expect(whole.top).toBe(1);
    expect(whole.bottom).toBe(1e-4);
  });

  it('is sensible for no point, one point and only points without errors', () => {
    for (const points of [[], [examplePoint({})], [examplePoint({ frames: 1e6, frameErrors: 0 })]]) {
      const whole = wholeWindow({ curves: groupPoints(points), kind: 'fer' });
      expect(whole.pMax).toBeGreaterThan(whole.pMin);
      expect(whole.bottom).toBeGreaterThan(0);
      expect(whole.bottom).toBeLessThan(whole.top);
    }
  });

  it('stretches to a requirement that is near and leaves out one that is far below', () => {
    const curves = groupPoints([examplePoint({ p: 0.02 })]);
    const at = (target: number) =>
      wholeWindow({ curves, kind: 'fer', requirement: { kind: 'fer', target, p: 0.008, label: '', shortLabel: '' } });
    expect(at(1e-4).bottom).toBeLessThan(1e-4);
    expect(at(1e-12).bottom).toBeGreaterThan(1e-5);
    expect(at(1e-4).pMin).toBeLessThan(0.008);
    expect(at(1e-12).pMin).toBeGreaterThan(0.008);
  });

  it('comes back from the address, and nonsense there is no window', () => {
    expect(parseWindow(windowText(window))).toEqual(window);
    for (const text of [null, '', 'x', '1_2_3', '0.01_0.05_1_1e-5', '0.05_0_1_1e-5', 'NaN_1_1_1'])
      expect(parseWindow(text)).toBeNull();
  });

  it('never leaves what the axes can show when magnified', () => {
    const wide = magnify(window, 1e-9);
    expect(wide?.pMax).toBeLessThanOrEqual(0.5);
    expect(wide?.top).toBe(1);
    expect(magnify(window, 1e6)).toBeNull();
  });

  it('ends the measured region at the lowest p with a point', () => {
    expect(lastMeasured(groupPoints([examplePoint({ p: 0.03 }), examplePoint({ p: 0.01 })]))).toBe(0.01);
    expect(lastMeasured([])).toBeNull();
  });
});

describe('a box drawn on the chart', () => {
  const frame = chartFrame(900, window, []);

  it('frames the window under it', () => {
    const box = { from: { x: frame.x(0.02), y: frame.y(1e-2) }, to: { x: frame.x(0.01), y: frame.y(1e-4) } };
    const zoomed = windowOfBox(box, frame, window)!;
    expect(zoomed.pMax).toBeCloseTo(0.02, 9);
    expect(zoomed.bottom / 1e-4).toBeCloseTo(1, 9);
  });

  it('that is flat keeps the rate axis, and a click is no box', () => {
    const flat = { from: { x: 200, y: 200 }, to: { x: 400, y: 204 } };
    expect(windowOfBox(flat, frame, window)).toMatchObject({ top: 1, bottom: 1e-5 });
    expect(windowOfBox({ from: { x: 200, y: 200 }, to: { x: 204, y: 203 } }, frame, window)).toBeNull();
  });
});

describe('marks', () => {
  const frame = chartFrame(900, window, []);

  it('for a point without errors stand at the upper limit, with no whisker and off the line', () => {
    const [curve] = groupPoints([
      examplePoint({ p: 0.03 }),
      examplePoint({ p: 0.02, frames: 1e5, frameErrors: 0 }),
      examplePoint({ p: 0.01 }),
    ]);
    const { marks, path } = curveMarks(curve!, 'fer', frame, window);
    expect(marks.map((mark) => mark.isBound)).toEqual([false, true, false]);
    expect(marks[1]).toMatchObject({ whisker: null, y: frame.y(4.6e-5) });
    expect(path.match(/[ML]/g)).toHaveLength(2);
  });

  it('keep a whisker whose lower limit is 0 finite', () => {
    const point = examplePoint({ p: 0.02, frames: 1e5, frameErrors: 1 });
    point.interval.lower = 0;
    const { marks } = curveMarks(groupPoints([point])[0]!, 'fer', frame, window);
    expect(Number.isFinite(marks[0]!.whisker!.low)).toBe(true);
  });
});

describe('ticks', () => {
  const place = chartFrame(900, window, []);

  it('of the channel keep their labels apart and mark every digit', () => {
    const ticks = channelTicks(0.05, 0.005, place.x, 54);
    expect(ticks.map((tick) => tick.value)).toEqual([
      0.005, 0.006, 0.007, 0.008, 0.009, 0.01, 0.015, 0.02, 0.03, 0.04, 0.05,
    ]);
    const labelled = ticks.filter((tick) => tick.isLabelled).map((tick) => tick.at);
    for (const a of labelled) for (const b of labelled) if (a !== b) expect(Math.abs(a - b)).toBeGreaterThanOrEqual(54);
    expect(ticks.find((tick) => tick.value === 0.01)?.isLabelled).toBe(true);
  });

  it('are even where a window holds few digits', () => {
    expect(channelTicks(0.013, 0.0105, (p) => p * 1e5, 10).length).toBeGreaterThanOrEqual(3);
  });

  it('of the rate thin out over hundreds of decades', () => {
    const { major, minor } = rateTicks(1, 1e-300, (rate) => -Math.log10(rate), 15);
    expect(major.filter((tick) => tick.isLabelled).length).toBeLessThanOrEqual(20);
    expect(minor).toEqual([]);
  });
});

describe('end labels', () => {
  const labels = fc.array(
    fc.record({ x: fc.integer({ min: 0, max: 300 }), y: fc.integer({ min: 0, max: 400 }), width: fc.constant(90) }),
    { maxLength: 12 },
  );

  it('never run into each other', () => {
    fc.assert(
      fc.property(labels, (wanted) => {
        const heights = spreadLabels(wanted, 16, 0, 1000);
        forEachOverlap(wanted, (a, b) => expect(Math.abs(heights[a]! - heights[b]!)).toBeGreaterThanOrEqual(16 - 1e-9));
      }),
    );
  });

  it('move no further in all than when pushed down one after the other', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 100, max: 300 }), { minLength: 1, maxLength: 8 }), (ys) => {
        const wanted = ys.map((y) => ({ x: 0, y, width: 50 }));
        const cost = (heights: readonly number[]) => heights.reduce((sum, h, i) => sum + (h - ys[i]!) ** 2, 0);
        expect(cost(spreadLabels(wanted, 16, 0, 1000))).toBeLessThanOrEqual(cost(pushedDown(ys, 16)) + 1e-6);
      }),
    );
  });

  it('that are apart stay where they are', () => {
    const wanted = [
      { x: 0, y: 100, width: 80 },
      { x: 10, y: 130, width: 80 },
      { x: 200, y: 101, width: 80 },
    ];
    expect(spreadLabels(wanted, 16, 0, 400)).toEqual([100, 130, 101]);
  });
});

function forEachOverlap(labels: readonly WantedLabel[], visit: (a: number, b: number) => void): void {
  for (let a = 0; a < labels.length; a++)
    for (let b = 0; b < a; b++) {
      const [p, q] = [labels[a]!, labels[b]!];
      if (p.x < q.x + q.width && q.x < p.x + p.width) visit(a, b);
    }
}

/** The plain way: from the top, each label just below the one before when it would touch it. */
function pushedDown(ys: readonly number[], gap: number): number[] {
  const order = ys.map((_, i) => i).sort((a, b) => ys[a]! - ys[b]!);
  const heights = [...ys];
  order.forEach((index, i) => {
    const before = i > 0 ? heights[order[i - 1]!]! + gap : -Infinity;
    heights[index] = Math.max(ys[index]!, before);
  });
  return heights;
}
