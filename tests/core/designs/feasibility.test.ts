import { describe, expect, test } from 'vitest';
import { hasTernaryZero } from '@/core/designs/feasibility/bruck-ryser-chowla.ts';
import { feasibility } from '@/core/designs/feasibility/feasibility.ts';
import { existence } from '../../reference/existence.ts';

/** Sources that settle a case which no rule here knows; the honest answer is then "open". */
const knownHereAsOpen = new Set([
  // Found by computer in 2025; no construction of it is built here.
  'H-3-42-6-1',
]);

describe('verdicts of the literature', () => {
  test.each(existence.map((entry) => [entry.id, entry] as const))('%s', (id, entry) => {
    const { verdict, reasons } = feasibility(entry);
    expect(verdict).toBe(knownHereAsOpen.has(id) ? 'open' : entry.verdict);
    if (verdict !== 'open') expect(reasons.length).toBeGreaterThan(0);
    for (const reason of reasons) expect(reason.source.year).toBeGreaterThan(1800);
  });
});

test('a plane of order 6 is refused by Bruck–Ryser–Chowla', () => {
  expect(feasibility({ t: 2, v: 43, k: 7, lambda: 1 })).toMatchObject({
    verdict: 'impossible',
    reasons: [{ rule: 'bruck-ryser-chowla', statement: expect.stringContaining('x² = 6·y² − z²') }],
  });
});

test('an affine plane of order 6 falls with the projective plane it would complete to', () => {
  const [reason] = feasibility({ t: 2, v: 36, k: 6, lambda: 1 }).reasons;
  expect(reason).toMatchObject({ rule: 'residual-embedding' });
});

test('S(5,6,18) is refused through its derived design', () => {
  const [reason] = feasibility({ t: 5, v: 18, k: 6, lambda: 1 }).reasons;
  expect(reason).toMatchObject({ rule: 'known-exception', statement: expect.stringContaining('derived design') });
  expect(reason!.source.year).toBe(2008);
});

test('a resolvable design needs k to divide v', () => {
  expect(feasibility({ t: 2, v: 13, k: 3, lambda: 1, resolvable: true }).reasons[0]!.rule).toBe('bose-resolvable');
  expect(feasibility({ t: 2, v: 15, k: 3, lambda: 1, resolvable: true }).verdict).toBe('exists');
});

test('what is known to exist but not built here is said so', () => {
  expect(feasibility({ t: 2, v: 66, k: 6, lambda: 1 }).words).toBe('exists, not built here');
});

test('triple systems exist exactly for v ≡ 1, 3 (mod 6)', () => {
  for (let v = 7; v <= 60; v++) {
    const admissible = v % 6 === 1 || v % 6 === 3;
    expect(feasibility({ t: 2, v, k: 3, lambda: 1 }).verdict).toBe(admissible ? 'exists' : 'impossible');
  }
});

test('a malformed question names the parameter', () => {
  expect(() => feasibility({ t: 0, v: 7, k: 3, lambda: 1 })).toThrow(/^t: got 0/);
  expect(() => feasibility({ t: 2, v: 7, k: 8, lambda: 1 })).toThrow(/^k: got 8/);
  expect(() => feasibility({ t: 2, v: 7, k: 3, lambda: 0.5 })).toThrow(/^lambda: got 0.5/);
});

test('the ternary form agrees with a search for zeros', () => {
  // A form x² = a·y² + b·z² with a zero has a small one (Holzer: |y|, |z| at most about √|ab|).
  const found = (a: number, b: number) => {
    for (let y = 0; y <= 40; y++) {
      for (let z = 0; z <= 40; z++) {
        const square = a * y * y + b * z * z;
        if ((y || z) && square >= 0 && Number.isInteger(Math.sqrt(square))) return true;
      }
    }
    return false;
  };
  for (let a = 1; a <= 24; a++) {
    for (let b = -12; b <= 12; b++) if (b !== 0) expect([a, b, hasTernaryZero(a, b)]).toEqual([a, b, found(a, b)]);
  }
});
