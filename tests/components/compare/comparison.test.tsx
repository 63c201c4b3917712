import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { groupPoints } from '@/client/curves/group-points.ts';
import { csvText, pointRows, tabbedText } from '@/client/curves/points-csv.ts';
import { chartCurves } from '@/components/charts/chart-curve.ts';
import { requirementOf, verdictOn } from '@/components/charts/requirement.ts';
import { CompareTable } from '@/components/compare/CompareTable.tsx';
import { comparisonGrid, gridText } from '@/components/compare/comparison-grid.ts';
import { selectedCurves, selectionText } from '@/components/compare/selection.ts';
import { examplePoint } from '../example-points.ts';
import { exampleRun } from '../example-runs.ts';

afterEach(cleanup);

const curves = groupPoints([
  examplePoint({ p: 0.03 }),
  examplePoint({ p: 0.01, frameErrors: 0 }),
  examplePoint({ p: 0.03, runId: 'run-2', n: 1023, k: 781, frameErrors: 40 }),
]);

describe('curves side by side', () => {
  it('have a row for every p, and no point where a curve has none', () => {
    const grid = comparisonGrid(chartCurves(curves));
    expect(grid.map((row) => row.p)).toEqual([0.03, 0.01]);
    expect(grid[1]?.cells[1]).toBeNull();
  });

  it('say "no point", "thin" and give the uncoded figures in the table', () => {
    render(<CompareTable curves={chartCurves(curves)} kind="fer" />);
    const rows = screen.getAllByRole('row');
    expect(rows[0]?.textContent).toContain('n = 1023');
    expect(rows[1]?.textContent).toContain('thin');
    expect(rows[2]?.textContent).toContain('no point');
    expect(rows[2]?.textContent).toContain('no point0.94');
  });

  it('are copied as the table shows them', () => {
    const text = tabbedText(gridText(chartCurves(curves), 'fer'));
    expect(text.split('\n')[0]).toContain('FER uncoded, n = 273');
    expect(text).toContain('< 4.6e-4 (thin)');
    expect(text).toContain('no point');
  });
});

describe('the choice of curves', () => {
  const runs = [
    exampleRun({ id: 'run-1', createdAt: '2026-12-01T04:00:00Z' }),
    exampleRun({ id: 'run-2', createdAt: '2026-12-01T05:00:00Z' }),
    exampleRun({ id: 'empty', createdAt: '2026-12-01T06:00:00Z' }),
  ];
  const keys = (address: { curves: string | null; run: string | null }) =>
    selectedCurves(curves, runs, address).map((curve) => curve.runId);

  it('comes back from the address in its order, without those that are gone', () => {
    const text = selectionText([curves[1]!.key, 'gone~gone~gone', curves[0]!.key]);
    expect(keys({ curves: text, run: null })).toEqual(['run-2', 'run-1']);
  });

  it('is that of the run named, else of the newest run with points', () => {
    expect(keys({ curves: null, run: 'run-1' })).toEqual(['run-1']);
    expect(keys({ curves: null, run: null })).toEqual(['run-2']);
    expect(keys({ curves: 'none', run: null })).toEqual([]);
  });
});

describe('points as a file', () => {
  const rows = pointRows(curves, () => exampleRun({ name: '=HYPERLINK("x")' }));

  it('leave the rate empty where no error was seen', () => {
    const at = rows[0]!.indexOf('FER');
    const row = rows.find((cells) => cells[rows[0]!.indexOf('frame errors')] === '0')!;
    expect(row.slice(at, at + 3)).toEqual(['', '', '0.00046']);
    expect(row.at(-1)).toBe('no error seen, upper limit only');
  });

  it('quote what needs quoting and let no cell run as a formula', () => {
    const text = csvText(rows);
    expect(text.split('\r\n')[1]).toMatch(/^"'=HYPERLINK\(""x""\)",/);
    expect(text).toContain('"(273,191) projective plane, q = 16"');
  });
});

describe('the requirement', () => {
  it('is met only when the upper limit is within it, and above only when the lower passes it', () => {
    expect(verdictOn({ lower: 1e-5, upper: 9e-4 }, 1e-3)).toBe('met');
    expect(verdictOn({ lower: 2e-3, upper: 4e-3 }, 1e-3)).toBe('above');
    expect(verdictOn({ lower: 5e-4, upper: 2e-3 }, 1e-3)).toBe('undecided');
    expect(verdictOn(undefined, 1e-3)).toBe('no point');
  });

  it('on FER is drawn as stated, with its channel point', () => {
    const requirement = requirementOf({ targetFer: 1e-3, channel: { kind: 'bsc', p: 0.012 } }, 'fer', curves);
    expect(requirement?.label).toBe('required: FER ≤ 10⁻³ at p = 0.012');
  });

  it('on UBER asks FER ≤ UBER · k, when all curves have one k', () => {
    const requirements = { targetUber: 1e-15 };
    expect(requirementOf(requirements, 'fer', curves.slice(0, 1))?.target).toBeCloseTo(1.91e-13, 20);
    expect(requirementOf(requirements, 'fer', curves)).toBeNull();
    expect(requirementOf(requirements, 'ber', curves)).toBeNull();
  });
});
