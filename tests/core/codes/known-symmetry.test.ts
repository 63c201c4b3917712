import { describe, expect, it } from 'vitest';
import { analyseLdpc } from '../../../src/core/codes/analyse-ldpc.ts';
import { absorbingSets } from '../../../src/core/codes/analysis/sets/absorbing-sets.ts';
import { smallestStoppingSets } from '../../../src/core/codes/analysis/sets/stopping-sets.ts';
import { tannerOrbits } from '../../../src/core/codes/analysis/tanner-orbits.ts';
import { knownSymmetry } from '../../../src/core/codes/known-symmetry.ts';
import { deriveLdpc } from '../../../src/core/codes/ldpc.ts';
import { codeQuestions } from '../../../src/core/codes/questions/index.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';

const codeOf = (family: string, params: Record<string, number | string>, checks: 'blocks' | 'points') =>
  deriveLdpc(buildDesign({ family, params }), { checks });

/** As it is read from the store: the matrix and where it came from. */
const stored = ({ H, design, checks, transforms }: ReturnType<typeof codeOf>) => ({ H, design, checks, transforms });

const cases = [
  ['affine-plane', { q: 4 }, 'blocks', 1],
  ['affine-plane', { q: 4 }, 'points', 2],
  ['generalised-quadrangle', { kind: 'W', q: 3 }, 'blocks', 2],
  ['generalised-quadrangle', { kind: 'W', q: 3 }, 'points', 2],
] as const;
const unital = ['hermitian-unital', { q: 3 }, 'points', 2] as const;

describe('the symmetry known of a design', () => {
  it.each([...cases, unital])(
    'of %s %j, %s as checks, is that of its matrix, %d orbits or fewer',
    (family, params, checks, most) => {
      const code = stored(codeOf(family, params, checks));
      const orbits = tannerOrbits(code.H, knownSymmetry(code));
      expect(orbits.symmetry).toBe('given');
      expect(orbits.columns.representatives.length).toBeLessThanOrEqual(most);
    },
  );

  it('is not claimed after a transform, nor of an upload, nor of a circulant, whose shift the matrix shows', () => {
    const plane = buildDesign({ family: 'affine-plane', params: { q: 4 } });
    const shortened = deriveLdpc(plane, { checks: 'blocks', transforms: [{ kind: 'shorten', bits: 2 }] });
    expect(knownSymmetry(stored(shortened))).toEqual([]);
    expect(knownSymmetry({ H: shortened.H })).toEqual([]);
    expect(knownSymmetry(stored(codeOf('projective-plane', { q: 4 }, 'points')))).toEqual([]);
  });

  it.each(cases)('changes no count of %s %j, %s as checks', (family, params, checks) => {
    const { H, ...known } = codeOf(family, params, checks);
    expect(analyseLdpc({ H, ...known }).cycles).toEqual(analyseLdpc({ H }).cycles);
    const orbits = tannerOrbits(H, knownSymmetry({ H, ...known }));
    const none = tannerOrbits(H, []);
    expect(none.symmetry).not.toBe('given');
    const stopping = (given: typeof orbits) => {
      const { size, count } = smallestStoppingSets(H, { nodes: 2e6, orbits: given });
      return { ...size.value, count };
    };
    expect(stopping(orbits)).toEqual(stopping(none));
  });

  it('changes no count of absorbing sets, and a budget reaches further with it', () => {
    const { H, ...known } = codeOf('generalised-quadrangle', { kind: 'W', q: 3 }, 'blocks');
    const found = (given: ReturnType<typeof tannerOrbits>['columns'], nodes: number) => {
      const { classes, completeTo } = absorbingSets(H, { largest: 6, nodes, orbits: given });
      const upTo = classes.filter(({ a }) => a <= completeTo.value);
      return { completeTo: completeTo.value, counts: upTo.map(({ a, b, count }) => [a, b, count]) };
    };
    const orbits = tannerOrbits(H, knownSymmetry({ H, ...known })).columns;
    const none = tannerOrbits(H, []).columns;
    expect(found(orbits, 3e6)).toEqual(found(none, 3e6));
    expect(found(orbits, 2e3).completeTo).toBeGreaterThan(found(none, 2e3).completeTo);
  });

  it('is asked of the design by the questions that use it, which say so', () => {
    const code = stored(codeOf('generalised-quadrangle', { kind: 'W', q: 3 }, 'points'));
    const { lines } = codeQuestions.cycles.answer(code, { seconds: 1 });
    expect(lines[0]).toMatchObject({ key: 'cycles-8', method: expect.stringMatching(/2 of 40 columns.*given/) });
  });
});
