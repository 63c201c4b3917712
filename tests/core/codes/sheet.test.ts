import { describe, expect, it } from 'vitest';
import { codeSheet, type SheetRequest } from '../../../src/core/codes/sheet.ts';

/** Every reading is a millisecond after the last. */
function sheetOf(request: SheetRequest) {
  let now = 0;
  const { properties } = codeSheet(request, { clock: () => now++ });
  return (key: string) => properties.find((line) => line.key === key);
}

const plane = { family: 'projective-plane', params: { q: 4 } };

describe('the sheet of a code', () => {
  it('says of each value that takes work the time spent on it', () => {
    const line = sheetOf({ design: plane, derivation: { kind: 'ldpc', checks: 'blocks' } });
    for (const key of ['rank', 'girth', 'cycles-6', 'distance', 'one-step-radius', 'structure'])
      expect(line(key)?.elapsedMs, key).toBeGreaterThan(0);
    const words = sheetOf({ design: plane, derivation: { kind: 'constant-weight' } });
    for (const key of ['distance', 'optimality', 'disjunct', 'classes', 'optical'])
      expect(words(key)?.elapsedMs, key).toBeGreaterThan(0);
  });

  it('allows a design with λ = 2, says that it has 4-cycles, and counts them: one for each pair of blocks', () => {
    // The biplane of order 3, translates of the squares mod 11: any two blocks share two points.
    const biplane = { family: 'quadratic-residue', params: { q: 11 } };
    const line = sheetOf({ design: biplane, derivation: { kind: 'ldpc', checks: 'blocks' } });
    expect(line('girth')).toMatchObject({ text: '4', method: expect.stringContaining('there are 4-cycles') });
    expect(line('cycles-4')).toMatchObject({ text: '55', grade: 'computed' });
  });
});
