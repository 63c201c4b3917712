import { describe, expect, test } from 'vitest';
import { deriveLdpc } from '../../src/core/codes/ldpc.ts';
import { type BlockDesign, blockOf, type DesignSpec } from '../../src/core/designs/block-design.ts';
import { mapsBlocksOntoThemselves } from '../../src/core/designs/block-symmetry.ts';
import { buildDesign, listFamilies, predictDesign } from '../../src/core/designs/design.ts';
import { families, familyById } from '../../src/core/designs/families/index.ts';
import type { DesignPrediction, EnumerationWindow } from '../../src/core/designs/family.ts';
import { transposeDesign } from '../../src/core/designs/geometry/transpose-design.ts';
import { verifyDesign } from '../../src/core/designs/verify.ts';
import { ParamError } from '../../src/core/errors.ts';
import type { Enclosure } from '../../src/core/evidence.ts';
import { breadthFirstGirth } from '../models/girth.ts';
import { eliminationRank, exhaustiveDistance } from '../models/rank.ts';

// Everything a family promises, held against each of its small parameter sets.
const SMALL: EnumerationWindow = { maxPoints: 130, maxBlocks: 420 };
const SETS_A_FAMILY = 24;
/** For families whose smallest member is larger. */
const WIDER: EnumerationWindow = { maxPoints: 400, maxBlocks: 8000 };

/** The smallest sets of the window, thinned evenly when there are many: a search family may enumerate hundreds. */
function smallSets(family: (typeof families)[number], window: EnumerationWindow): unknown[] {
  const sets = [...family.enumerate(window)];
  const step = Math.max(1, sets.length / SETS_A_FAMILY);
  return Array.from({ length: Math.min(sets.length, SETS_A_FAMILY) }, (_, i) => sets[Math.floor(i * step)]);
}

describe.each(families.map((f) => [f.id, f] as const))('%s', (id, family) => {
  test('its description is complete and its example values are a design', () => {
    expect(familyById(id)).toBe(family);
    expect(family.title.length).toBeGreaterThan(3);
    expect(family.source.authors && family.source.year && family.source.title).toBeTruthy();
    const required = family.params.filter((p) => !p.optional);
    const params = Object.fromEntries(required.map((p) => [p.name, p.example])) as DesignSpec['params'];
    expect(predictDesign({ family: id, params }).v).toBeGreaterThan(0);
  });

  test('each small parameter set builds what it predicts', () => {
    const small = smallSets(family, SMALL);
    const sets = small.length > 0 ? small : smallSets(family, WIDER).slice(0, 1);
    expect(sets.length).toBeGreaterThan(0);
    for (const set of sets) holdsItsPromises(id, set as DesignSpec['params']);
  });

  test('enumeration stays inside its window', () => {
    const window = { maxPoints: 400, maxBlocks: 900 };
    for (const set of smallSets(family, window)) {
      const { v, b } = family.predict(family.parse(set as DesignSpec['params']));
      expect(v <= window.maxPoints && b <= window.maxBlocks, JSON.stringify(set)).toBe(true);
    }
  });

  test('a parameter of the wrong kind, a missing one and an unknown one are refused by name', () => {
    const good = [...family.enumerate(WIDER)][0] as DesignSpec['params'];
    for (const { name, kind, optional } of family.params) {
      const wrong = kind === 'integer' ? ['7', 2.5, -1, Number.NaN, Number.POSITIVE_INFINITY, null] : [7.5, null];
      for (const value of optional ? wrong : [...wrong, undefined]) {
        const params = { ...good, [name]: value } as DesignSpec['params'];
        expect(refusal(() => family.parse(params))?.param, `${name} = ${value}`).toContain(name);
      }
    }
    expect(refusal(() => family.parse({ ...good, colour: 3 }))?.param).toBe('colour');
    expect(refusal(() => family.parse(null as unknown as DesignSpec['params']))).toBeInstanceOf(ParamError);
  });
});

test('an unknown family is refused with the list of those there are', () => {
  const error = refusal(() => buildDesign({ family: 'nonesuch', params: {} }));
  for (const { id } of listFamilies()) expect(error?.accepted).toContain(id);
});

test('no two families share an id', () => {
  expect(new Set(families.map((f) => f.id)).size).toBe(families.length);
});

function refusal(run: () => unknown): ParamError | undefined {
  try {
    run();
  } catch (error) {
    if (error instanceof ParamError) return error;
    throw error;
  }
  return undefined;
}

function holdsItsPromises(family: string, params: DesignSpec['params']): void {
  const said = `${family} ${JSON.stringify(params)}`;
  const prediction = predictDesign({ family, params });
  const design = buildDesign({ family, params });
  expect(design.spec, said).toEqual({ family, params });
  countsAsPredicted(design, prediction, said);
  coversAsPredicted(design, prediction, said);
  symmetryActs(design, said);
  classesPartition(design, prediction, said);
  codesAsPredicted(design, prediction, said);
}

function countsAsPredicted(design: BlockDesign, { v, b, k, r }: DesignPrediction, said: string): void {
  expect([design.v, design.b, design.blockStart.length], said).toEqual([v, b, b + 1]);
  const on = new Uint32Array(v);
  for (let i = 0; i < b; i++) {
    const block = blockOf(design, i);
    expect(block.length, said).toBe(k);
    expect(
      block.every((p, j) => p < v && (j === 0 || p > block[j - 1]!)),
      said,
    ).toBe(true);
    for (const p of block) on[p]!++;
  }
  expect(new Set(on), said).toEqual(new Set([r]));
}

function coversAsPredicted(design: BlockDesign, prediction: DesignPrediction, said: string): void {
  const { t, lambda } = prediction;
  expect(verifyDesign(design, { t, lambda }).holds, said).toBe(true);
  if (!prediction.partialLinear) return;
  const together = new Set<number>();
  for (let i = 0; i < design.b; i++) {
    const block = blockOf(design, i);
    block.forEach((p, j) => {
      for (const q of block.subarray(j + 1)) together.add(p * design.v + q);
    });
  }
  expect(together.size, `${said}: no two points on two blocks`).toBe(
    (design.b * prediction.k * (prediction.k - 1)) / 2,
  );
}

function symmetryActs(design: BlockDesign, said: string): void {
  for (const { pointPerm, order } of design.symmetry ?? []) {
    expect(mapsBlocksOntoThemselves(design, pointPerm), said).toBe(true);
    expect(orderOf(pointPerm), said).toBe(order);
  }
}

function orderOf(permutation: Uint32Array): number {
  const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));
  const seen = new Uint8Array(permutation.length);
  let order = 1;
  for (let start = 0; start < permutation.length; start++) {
    let length = 0;
    for (let x = start; !seen[x]; x = permutation[x]!, length++) seen[x] = 1;
    if (length > 0) order = (order * length) / divisor(order, length);
  }
  return order;
}

function classesPartition(design: BlockDesign, { k, r, resolvable }: DesignPrediction, said: string): void {
  const { classes } = design;
  if (!classes) return;
  expect(classes.length, said).toBe(design.b);
  if (resolvable) expect(new Set(classes).size, said).toBe(r);
  const seen = new Set<number>();
  for (let i = 0; i < design.b; i++) for (const p of blockOf(design, i)) seen.add(classes[i]! * design.v + p);
  expect(seen.size, `${said}: blocks of one class are disjoint`).toBe(design.b * k);
}

function codesAsPredicted(design: BlockDesign, prediction: DesignPrediction, said: string): void {
  for (const code of prediction.codes) {
    const { H } = deriveLdpc(design, { checks: code.checks });
    const rank = eliminationRank(H);
    const at = `${said} checks ${code.checks}`;
    expect(code.n, at).toBe(H.cols);
    encloses(code.rank.value, rank, `${at} rank`);
    encloses(code.k.value, H.cols - rank, `${at} k`);
    encloses(code.girth.value, breadthFirstGirth(H), `${at} girth`);
    const { lower, upper } = code.distance.value;
    expect(lower <= upper && upper <= H.cols, `${at} distance`).toBe(true);
    if (H.cols - rank <= 14) encloses(code.distance.value, exhaustiveDistance(H), `${at} distance`);
    expect([code.rowWeight, code.columnWeight], at).toEqual(weightsOf(H));
    expect(code.oneStepRadius.value * 2, at).toBeLessThanOrEqual(code.columnWeight);
    const columns = code.checks === 'blocks' ? design : transposeDesign(design);
    if (code.structure === 'cyclic') expect(shiftsWithin(columns, code.n), `${at} cyclic`).toBe(true);
    if (code.structure === 'quasi-cyclic') {
      const sizes = Array.from({ length: code.n - 1 }, (_, i) => i + 2).filter((size) => code.n % size === 0);
      expect(
        sizes.some((size) => shiftsWithin(columns, size)),
        `${at} quasi-cyclic`,
      ).toBe(true);
    }
  }
}

/** Whether moving each run of `size` columns on by one, the last to the front, maps the checks onto themselves. */
function shiftsWithin(columns: BlockDesign, size: number): boolean {
  const shift = Uint32Array.from({ length: columns.v }, (_, c) => ((c + 1) % size === 0 ? c + 1 - size : c + 1));
  return mapsBlocksOntoThemselves(columns, shift);
}

function weightsOf(H: { rows: number; cols: number; rowStart: Uint32Array; colIndex: Uint32Array }): number[] {
  return [H.rowStart[1]!, H.colIndex.filter((c) => c === 0).length];
}

function encloses({ lower, upper }: Enclosure, value: number, said: string): void {
  expect(lower <= value && value <= upper, `${said}: ${value} in ${lower}..${upper}`).toBe(true);
}
