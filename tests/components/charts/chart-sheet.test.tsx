import { render } from '@testing-library/react';
import { expect, test, vi } from 'vitest';
import { groupPoints } from '@/client/curves/group-points.ts';
import { chartCurves } from '@/components/charts/chart-curve.ts';
import { ErrorRateChart } from '@/components/charts/error-rate-chart/ErrorRateChart.tsx';
import { chartSheet } from '@/components/charts/export/chart-sheet.ts';
import { wrapText } from '@/components/charts/export/wrap-text.ts';
import { runsText } from '@/components/charts/runs-text.ts';
import { examplePoint } from '../example-points.ts';

const curves = chartCurves(
  groupPoints([examplePoint({ p: 0.03, frameErrors: 3000 }), examplePoint({ p: 0.02, frameErrors: 50 })]),
);
const provenance = runsText([{ name: 'Sweep <1>', seed: 'a & b', framesPerShard: 20_000 }]);

function sheet(): Document {
  const { container } = render(
    <ErrorRateChart
      title="Frame error rate"
      curves={curves}
      kind="fer"
      onKind={vi.fn()}
      hidden={new Set()}
      onToggle={vi.fn()}
      zoom={null}
      onZoom={vi.fn()}
      intervalMethod="Clopper–Pearson"
      provenance={provenance}
    />,
  );
  const drawing = container.querySelector<SVGSVGElement>('svg[role="img"]')!;
  const [, , width, height] = drawing.getAttribute('viewBox')!.split(' ').map(Number);
  // The test's document does no layout.
  Object.defineProperty(drawing, 'viewBox', { value: { baseVal: { width, height } } });
  const text = chartSheet(drawing, { title: 'Frame error rate', curves, key: 'Bars: interval.', provenance });
  return new DOMParser().parseFromString(text, 'image/svg+xml');
}

test('a chart’s file names its curves, what the marks mean, and the runs and seeds that repeat it', () => {
  const svg = sheet();
  const words = [...svg.querySelectorAll('text')].map((text) => text.textContent).join(' ');
  expect(words).toContain('Frame error rate');
  expect(words).toContain(curves[0]!.label);
  expect(words).toContain('Bars: interval.');
  expect(words.replace(/\s+/g, ' ')).toContain(
    'run “Sweep <1>”, seed “a & b”, 20 000 frames a shard'.replace(/\s+/g, ' '),
  );
  expect(words).toContain('not for a device');
});

test('a chart’s file stands alone: no class, no style sheet of ours, no script', () => {
  const svg = sheet();
  expect(svg.querySelectorAll('[class], [style], script, foreignObject').length).toBe(0);
  expect(svg.querySelectorAll('[data-point], [aria-labelledby]').length).toBe(0);
  expect(new XMLSerializer().serializeToString(svg)).not.toMatch(/var\(|light-dark\(|color-mix\(/);
  expect(svg.querySelectorAll('circle').length).toBeGreaterThanOrEqual(2);
});

test('long provenance is broken at blanks', () => {
  expect(wrapText('one two three', 7)).toEqual(['one two', 'three']);
  expect(wrapText('immeasurable x', 5)).toEqual(['immeasurable', 'x']);
  expect(wrapText('', 5)).toEqual([]);
});
