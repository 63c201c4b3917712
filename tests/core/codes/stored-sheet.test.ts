import { describe, expect, it } from 'vitest';
import { deriveLdpc, type Transform } from '../../../src/core/codes/ldpc.ts';
import { storedSheet } from '../../../src/core/codes/stored-sheet.ts';
import { transformKinds } from '../../../src/core/codes/transforms/registry.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { ParamError } from '../../../src/core/errors.ts';

const design = buildDesign({ family: 'projective-plane', params: { q: 4 } });
const matrix = deriveLdpc(design, { checks: 'blocks' }).H;
const sheetOf = (transforms: Transform[], from = matrix) =>
  storedSheet({ matrix: from, designTitle: 'Uploaded matrix, 21 × 21', transforms }, { clock: () => 0 });

/** One of each kind that needs a matrix and nothing more. */
const steps: Transform[] = [
  { kind: 'shorten', bits: 3 },
  { kind: 'puncture', columns: [0, 5] },
  { kind: 'extend-by-parity' },
  { kind: 'drop-dependent-rows' },
  { kind: 'split-columns', parts: 2 },
  { kind: 'split-rows', parts: 5 },
  { kind: 'mask', blockSize: 7, mask: ['110', '011', '111'] },
  { kind: 'lift', size: 16, girth: 6, seed: 's' },
  { kind: 'superpose', constituents: [{ cols: 2, rows: [[0], [1]] }] },
  { kind: 'transpose' },
];

describe('a stored matrix', () => {
  it('takes every step but those that need a construction', () => {
    const known = [...transformKinds.keys()].filter((kind) => kind !== 'keep-classes');
    expect(steps.map(({ kind }) => kind).sort()).toEqual(known.sort());
  });

  it.each(steps.map((step) => [step.kind, step] as const))(
    'under %s is the matrix that the same step makes of its construction, analysed',
    (_, step) => {
      const { H, n, k, certificate, properties } = sheetOf([step]);
      expect(H).toEqual(deriveLdpc(design, { checks: 'blocks', transforms: [step] }).H);
      expect(n).toBe(H.cols);
      expect(certificate).toBeNull();
      expect(properties.find(({ key }) => key === 'k')).toMatchObject({ number: k, grade: 'computed' });
    },
  );

  it('taken on from a step is what all steps make of the first matrix', () => {
    for (const [i, first] of steps.slice(0, 4).entries()) {
      const second = steps[(i + 1) % 4]!;
      expect(sheetOf([second], sheetOf([first]).H).H).toEqual(sheetOf([first, second]).H);
    }
  });

  it('has no parallel classes to keep, and says what would have', () => {
    const asked = () => sheetOf([{ kind: 'keep-classes', classes: 2 }]);
    expect(asked).toThrow(ParamError);
    expect(asked).toThrow(/a design given with parallel classes/);
  });
});
