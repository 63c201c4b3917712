import { describe, expect, test } from 'vitest';
import { deriveConstantWeight, wordOf } from '../../src/core/codes/constant-weight/constant-weight-code.ts';
import { constantWeightSheet } from '../../src/core/codes/constant-weight/constant-weight-sheet.ts';
import { tableEncoder } from '../../src/core/codes/constant-weight/enumerative.ts';
import { complementCode, shortenAt } from '../../src/core/codes/constant-weight/smaller-codes.ts';
import { partitionByClasses } from '../../src/core/codes/constant-weight/word-classes.ts';
import type { DesignSpec } from '../../src/core/designs/block-design.ts';
import { buildDesign, predictDesign } from '../../src/core/designs/design.ts';
import { families } from '../../src/core/designs/families/index.ts';
import { readWordList, writeWordListText } from '../../src/core/formats/word-list.ts';
import { plainDistance } from '../models/constant-weight.ts';

// What a constant-weight code promises, held against every family whose blocks share few points: each t points on one
// block, or two points on one at most.
const SMALL = { maxPoints: 70, maxBlocks: 330 };
const SETS_A_FAMILY = 5;

const cases = families.flatMap(({ id, enumerate, predict, parse }) => {
  const sets = [...enumerate(SMALL)].filter((set) => {
    const { lambda, partialLinear } = predict(parse(set as DesignSpec['params']));
    return lambda === 1 || partialLinear === true;
  });
  const step = Math.max(1, sets.length / SETS_A_FAMILY);
  return Array.from({ length: Math.min(sets.length, SETS_A_FAMILY) }, (_, i): [string, DesignSpec['params']] => [
    id,
    sets[Math.floor(i * step)] as DesignSpec['params'],
  ]);
});

test('the suite reaches a dozen families', () => {
  expect(new Set(cases.map(([id]) => id)).size).toBeGreaterThanOrEqual(12);
});

describe.each(cases)('the words of %s %j', (family, params) => {
  const design = buildDesign({ family, params });
  const { t, k, lambda, b } = predictDesign({ family, params });
  const code = deriveConstantWeight(design);
  const sheet = constantWeightSheet(code, { resolutionNodes: 2000, coverSteps: 200_000 });

  test('are the blocks, and as far apart as pairs compared bit by bit say', () => {
    expect([code.n, code.w, code.M]).toEqual([design.v, k, b]);
    const plain = plainDistance(code);
    expect(code.distanceEvidence.value).toEqual({ lower: plain, upper: plain });
    expect(code.distance).toBeGreaterThanOrEqual(2 * (k - (lambda === 1 ? t : 2) + 1));
  });

  test('are no more than the bound; where each t points are on one block, no code has more', () => {
    expect(code.M).toBeLessThanOrEqual(sheet.size!.known.upper.size);
    if (lambda === 1 && code.M > 1) expect(sheet.size!.optimality.value).toBe('optimal');
  });

  test('are numbered without gap or repetition, and come back from a file in that order', () => {
    const encoder = tableEncoder(code);
    const list = readWordList(writeWordListText(code));
    for (let i = 0; i < code.M; i++) expect(encoder.index(wordOf(list, i))).toBe(BigInt(i));
    const message = Uint8Array.from({ length: encoder.messageBits }, (_, i) => i & 1);
    expect(encoder.decode(encoder.encode(message))).toEqual(message);
  });

  test('shortened part in two, complemented twice are themselves, by classes lose no word', () => {
    const [zeros, ones] = [shortenAt(code, 0, 0), shortenAt(code, 0, 1)];
    expect(zeros.M + ones.M).toBe(code.M);
    expect(Math.min(zeros.distance, ones.distance)).toBeGreaterThanOrEqual(Math.min(code.distance, 2 * ones.w));
    expect(complementCode(complementCode(code))).toEqual(code);
    const { classes } = sheet.resolution;
    if (!classes) return;
    const parts = partitionByClasses(code, classes);
    expect(parts.reduce((sum, part) => sum + part.M, 0)).toBe(code.M);
    for (const part of parts) expect(part.M < 2 || part.distance === 2 * k).toBe(true);
  });

  test('are at least as disjunct as Kautz and Singleton say; shifts of optical words meet within the bound', () => {
    const shared = k - code.distance / 2;
    const { lower, upper } = sheet.disjunctness.value;
    expect(lower).toBeGreaterThanOrEqual(
      Math.min(code.M - 1, shared === 0 ? code.M - 1 : Math.floor((k - 1) / shared)),
    );
    expect(upper).toBeGreaterThanOrEqual(lower);
    if (sheet.optical) expect(sheet.optical.words.length).toBeLessThanOrEqual(sheet.optical.bound.value);
  });

  test('have a sheet every line of which is graded', () => {
    expect(sheet.properties.length).toBeGreaterThan(15);
    expect(sheet.properties.every(({ text, grade, method }) => text && grade && method)).toBe(true);
  });
});
