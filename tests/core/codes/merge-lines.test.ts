import { describe, expect, test } from 'vitest';
import type { Property } from '@/core/codes/properties.ts';
import { mergeLines } from '@/core/codes/questions/merge-lines.ts';

const line = (grade: Property['grade'], text: string, number: number, method = 'm'): Property => ({
  key: 'distance',
  label: 'Minimum distance',
  text,
  number,
  grade,
  method,
});
const merged = (known: Property, found: Property) => mergeLines([known], [found]);

describe('what is known and what is found', () => {
  test('a new property is added', () => {
    const found = { ...line('computed', '6', 6), key: 'stopping-size' };
    expect(mergeLines([line('proved', '6', 6)], [found])).toEqual({
      lines: [line('proved', '6', 6), found],
      improved: ['stopping-size'],
    });
  });

  test('an exact value stays, whatever is found', () => {
    for (const grade of ['proved', 'computed'] as const)
      for (const found of [line('computed', '8', 8), line('bounded', '4 to 9', 4)])
        expect(merged(line(grade, '8', 8), found)).toEqual({ lines: [line(grade, '8', 8)], improved: [] });
  });

  test('an exact value takes the place of bounds', () => {
    expect(merged(line('bounded', '4 to 20', 4), line('computed', '12', 12)).lines[0]).toMatchObject({ text: '12' });
  });

  test('a wider or equal enclosure adds nothing, a narrower one takes its place', () => {
    const known = line('bounded', '6 to 20', 6);
    expect(merged(known, line('bounded', '4 to 20', 4)).improved).toEqual([]);
    expect(merged(known, line('bounded', '6 to 20', 6)).improved).toEqual([]);
    expect(merged(known, line('bounded', '6 to 12', 6)).lines[0]!.text).toBe('6 to 12');
  });

  test('of two that overlap the common part is kept, each end with its own method', () => {
    const known = line('bounded', '8 to 1\u2009200', 8, 'below: tree; above: Singleton bound');
    const found = line('bounded', '6 to 12', 6, 'below: orthogonal checks; above: a codeword found');
    const { lines, improved } = merged(known, found);
    expect(improved).toEqual(['distance']);
    expect(lines[0]).toMatchObject({
      text: '8 to 12',
      number: 8,
      grade: 'bounded',
      method: 'below: tree; above: a codeword found',
    });
  });

  test('ends that meet make the value exact', () => {
    const known = line('bounded', '8 to 20', 8, 'below: tree; above: Singleton bound');
    const found = line('bounded', '6 to 8', 6, 'below: checks; above: a codeword found');
    expect(merged(known, found).lines[0]).toMatchObject({ text: '8', number: 8, grade: 'computed' });
  });

  test('a count that is a bound from below rises and does not fall', () => {
    const reach = (bits: number) => line('bounded', `all of up to ${bits} bits`, bits);
    expect(merged(reach(4), reach(6)).lines[0]!.number).toBe(6);
    expect(merged(reach(6), reach(4)).lines[0]!.number).toBe(6);
  });
});
