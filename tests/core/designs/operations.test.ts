import { describe, expect, it } from 'vitest';
import { blockOf, type DesignSpec } from '../../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../../src/core/designs/design.ts';
import { verifyDesign } from '../../../src/core/designs/verify.ts';
import { ParamError } from '../../../src/core/errors.ts';

const spec = (family: string, params: DesignSpec['params']): DesignSpec => ({ family, params });
const witt24 = spec('witt', { v: 24 });
const squares11 = spec('quadratic-residue', { q: 11 });

function blockSet(design: ReturnType<typeof buildDesign>): Set<string> {
  return new Set(Array.from({ length: design.b }, (_, i) => blockOf(design, i).join()));
}

describe('operations on designs', () => {
  it('the complement of the complement and the dual of the dual are the design again', () => {
    const once = buildDesign(squares11);
    for (const family of ['complement', 'dual']) {
      const twice = buildDesign(spec(family, { of: spec(family, { of: squares11 }) }));
      expect(blockSet(twice)).toEqual(blockSet(once));
    }
  });

  it('deriving S(5,8,24) three times at its last point leads to the plane of order 4', () => {
    const at = (of: DesignSpec, point: number) => spec('derived', { of, point });
    const plane = at(at(at(witt24, 23), 22), 21);
    expect(predictDesign(plane)).toMatchObject({ t: 2, v: 21, b: 21, k: 5, lambda: 1 });
    expect(verifyDesign(buildDesign(plane), { t: 2, lambda: 1 }).holds).toBe(true);
  });

  it('the residual of a projective plane by a line is an affine plane, and of S(5,8,24) by a point a 4-design', () => {
    const affine = spec('residual', { of: spec('projective-plane', { q: 5 }), by: 'block', at: 7 });
    expect(predictDesign(affine)).toMatchObject({ t: 2, v: 25, b: 30, k: 5, lambda: 1 });
    expect(verifyDesign(buildDesign(affine), { t: 2, lambda: 1 }).holds).toBe(true);
    const four = predictDesign(spec('residual', { of: witt24 }));
    expect(four).toMatchObject({ t: 4, v: 23, b: 506, k: 8, lambda: 4 });
    expect(verifyDesign(buildDesign(spec('residual', { of: witt24 })), { t: 4, lambda: 4 }).holds).toBe(true);
  });

  it('keeping parallel classes leaves every point on that many blocks', () => {
    const kept = buildDesign(spec('classes', { of: spec('affine-plane', { q: 7 }), keep: 3 }));
    expect([kept.b, verifyDesign(kept, { t: 1, lambda: 3 }).holds]).toEqual([21, true]);
    expect(() => predictDesign(spec('classes', { of: squares11, keep: 2 }))).toThrow(ParamError);
    expect(() => predictDesign(spec('classes', { of: spec('affine-plane', { q: 7 }), keep: 9 }))).toThrow(
      /1?8, the number/,
    );
  });

  it('the union of two triple systems has λ = 2, and different sizes are refused', () => {
    const bose = spec('steiner-triple', { v: 21, method: 'bose' });
    const both = spec('union', { first: bose, second: spec('relabel', { of: bose, seed: 'x' }) });
    expect(verifyDesign(buildDesign(both), { t: 2, lambda: 2 }).holds).toBe(true);
    expect(() => buildDesign(spec('union', { first: bose, second: squares11 }))).toThrow(/21 points/);
  });

  it('relabelling moves points but keeps symmetry and strength', () => {
    const moved = buildDesign(spec('relabel', { of: squares11, seed: 'y' }));
    expect(blockSet(moved)).not.toEqual(blockSet(buildDesign(squares11)));
    expect(verifyDesign(moved, { t: 2, lambda: 2 }).holds).toBe(true);
  });

  it('takes the inner design as JSON text, and refuses what is no design or nested too deep', () => {
    const text = JSON.stringify(squares11);
    expect(predictDesign(spec('complement', { of: text }))).toMatchObject({ v: 11, k: 6, lambda: 3 });
    expect(() => predictDesign(spec('complement', { of: 'squares' }))).toThrow(ParamError);
    let deep = squares11;
    for (let i = 0; i < 8; i++) deep = spec('dual', { of: deep });
    expect(() => predictDesign(deep)).toThrow(ParamError);
    expect(() => predictDesign(spec('dual', { of: spec('nonesuch', {}) }))).toThrow(ParamError);
  });
});
