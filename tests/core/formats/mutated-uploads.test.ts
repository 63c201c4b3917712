import { expect, test } from 'vitest';
import { readMutated } from '../../models/mutated-uploads.ts';

// The long run, of a million, is tests/long/mutated-uploads.test.ts.
test('ten thousand damaged files are read or refused with a typed error', () => {
  const { crashes, read, refused } = readMutated('short', 10_000);
  expect(crashes).toEqual([]);
  expect(read).toBeGreaterThan(100);
  expect(refused).toBeGreaterThan(1000);
});
