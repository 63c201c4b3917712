import { describe, expect, it } from 'vitest';
import { groupPoints } from '@/client/curves/group-points.ts';
import { commonPoints, differenceText, pValueText, ratioText, sharesFrames } from '@/components/compare/difference.ts';
import { examplePoint } from '../example-points.ts';

const curve = (runId: string, points: [p: number, frameErrors: number][]) =>
  groupPoints(points.map(([p, frameErrors]) => examplePoint({ id: `${runId} ${p}`, runId, p, frameErrors })))[0]!;
const first = curve('a', [
  [0.02, 500],
  [0.01, 20],
]);
const second = curve('b', [
  [0.02, 510],
  [0.01, 90],
  [0.005, 1],
]);

describe('the test of a difference', () => {
  it('is made only where both were measured', () => {
    expect(commonPoints(first, second).map(([{ p }]) => p)).toEqual([0.02, 0.01]);
  });

  it('says which fails less often, or that the counts do not tell', () => {
    const [near, far] = commonPoints(first, second).map((pair) => differenceText('A', 'B', pair, 0.99));
    expect(near!.verdict).toMatch(/^The counts do not tell A and B apart/);
    expect(far!.verdict).toMatch(/^A fails less often than B/);
    expect(far!.pValue).toBeLessThan(1e-8);
    expect(far!.ratio.upper).toBeLessThan(1);
  });

  it('knows that a seed and a length settle the frames', () => {
    const seeds = (id: string) => ({ a: 'same', b: 'same', c: 'other' })[id];
    expect(sharesFrames(first, second, seeds)).toBe(true);
    expect(sharesFrames(first, { ...second, runId: 'c' }, seeds)).toBe(false);
    expect(sharesFrames(first, { ...second, n: 21 }, seeds)).toBe(false);
    expect(sharesFrames({ ...first, runId: 'measured' }, { ...second, runId: 'measured too' }, seeds)).toBe(false);
  });

  it('writes ratios without an end and p-values that are bounds', () => {
    expect(ratioText({ estimate: Number.NaN, lower: 0, upper: Infinity })).toContain('no error in either');
    expect(ratioText({ estimate: 0.5, lower: 0, upper: Infinity })).toBe('0.5 (0 – ∞)');
    expect(pValueText(1e-25)).toMatch(/^</);
    expect(pValueText(0.25)).toBe('0.250');
  });
});
