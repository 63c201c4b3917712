import { expect, test } from 'vitest';
import { girthCeiling } from '@/core/catalogue/girth-ceiling.ts';

test('generalised polygons of every kind reach the ceiling of their counts', () => {
  expect(girthCeiling({ v: 7, b: 7, k: 3, r: 3 })).toBe(6);
  expect(girthCeiling({ v: 15, b: 15, k: 3, r: 3 })).toBe(8);
  expect(girthCeiling({ v: 63, b: 63, k: 3, r: 3 })).toBe(12);
  expect(girthCeiling({ v: 27, b: 45, k: 3, r: 5 })).toBe(8);
});

test('one vertex fewer lowers it', () => {
  expect(girthCeiling({ v: 14, b: 14, k: 3, r: 3 })).toBe(6);
  expect(girthCeiling({ v: 62, b: 62, k: 3, r: 3 })).toBeLessThan(12);
});
