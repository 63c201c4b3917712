import { describe, expect, it } from 'vitest';
import { covering } from '../../../../src/core/designs/families/covering.ts';
import { packing } from '../../../../src/core/designs/families/packing.ts';
import { packingBound, reportCovering, reportPacking } from '../../../../src/core/designs/packing-covering/coverage.ts';
import { LimitError, ParamError } from '../../../../src/core/errors.ts';
import { coveringNumbers, packingNumbers } from '../../../reference/packings-coverings.ts';

describe('packings', () => {
  it('of triples reach the largest number for every v from 4 to 100', () => {
    for (let v = 4; v <= 100; v++) {
      const design = packing.build(packing.parse({ t: 2, k: 3, v, method: 'optimal' }));
      const report = reportPacking(design, 2, 3);
      expect(report.holds && report.blocks === packingBound(2, 3, v), `v = ${v}`).toBe(true);
    }
  });

  it('have the published largest numbers', () => {
    for (const { t, k, v, most } of packingNumbers) {
      // Quadruples where a system on v or v + 1 points gives them: every residue but 0 and 5 modulo 6.
      if (k >= v || (t === 3 && (v < 7 || v % 6 === 0 || v % 6 === 5))) continue;
      expect(packing.build(packing.parse({ t, k, v, method: 'optimal' })).b, `${t}-(${v},${k})`).toBe(most);
    }
  });

  it('by search are packings below the bound, the same for the same seed', () => {
    for (const [t, k, v] of [
      [2, 4, 30],
      [3, 5, 17],
      [2, 5, 40],
      [4, 6, 14],
    ] as const) {
      for (const method of ['greedy', 'random-greedy', 'climbing'] as const) {
        if (method === 'climbing' && t !== 2) continue;
        const params = packing.parse({ t, k, v, method, seed: 'x' });
        const design = packing.build(params);
        const report = reportPacking(design, t, k);
        expect(report.holds && report.density <= 1 && report.density > 0.3, `${t} ${k} ${v} ${method}`).toBe(true);
        expect(packing.build(params).blockPoints).toEqual(design.blockPoints);
      }
    }
  });

  it('climbing gets nearer to the bound than random greed for pairs', () => {
    const density = (method: string) =>
      reportPacking(packing.build(packing.parse({ t: 2, k: 4, v: 40, method })), 2, 4).density;
    expect(density('climbing')).toBeGreaterThan(density('random-greedy'));
  });

  it('refuses optimal where none is built and searches too large', () => {
    expect(() => packing.parse({ t: 2, k: 4, v: 30, method: 'optimal' })).toThrow(ParamError);
    expect(() => packing.parse({ t: 4, k: 6, v: 500, method: 'greedy' })).toThrow(LimitError);
  });
});

describe('coverings', () => {
  it('cover every t-subset, never fewer than the published least number, and the bound is the published one', () => {
    for (const { t, k, v, least, schonheim, fromMemory } of coveringNumbers) {
      if (v > 13) continue;
      const design = covering.build(covering.parse({ t, k, v, method: 'random-greedy' }));
      const report = reportCovering(design, t, k);
      expect(report.holds).toBe(true);
      expect(report.bound).toBe(schonheim);
      if (!fromMemory) expect(design.b, `C(${v},${k},${t})`).toBeGreaterThanOrEqual(least);
      expect(design.b, `C(${v},${k},${t})`).toBeLessThanOrEqual(Math.ceil(1.6 * least));
    }
  });

  it('are optimal from Steiner systems', () => {
    const design = covering.build(covering.parse({ t: 3, k: 4, v: 14, method: 'optimal' }));
    expect(reportCovering(design, 3, 4)).toMatchObject({ holds: true, density: 1, blocks: 91 });
  });
});
