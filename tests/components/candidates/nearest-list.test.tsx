import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, expect, test } from 'vitest';
import { NearestList } from '@/components/candidates/NearestList.tsx';

afterEach(cleanup);

test('where nothing fits, the theorem in the way stands with its source', () => {
  const source = { authors: 'R. C. Singleton', year: 1964, title: 'Maximum distance q-nary codes' };
  render(<NearestList nearest={[]} obstacles={[{ rule: 'singleton', statement: 'No such code.', source }]} />);
  expect(screen.getByText('Impossible.').parentElement?.textContent).toContain('No such code.');
  expect(screen.getByText(/Singleton 1964, Maximum distance/)).toBeTruthy();
  expect(screen.getByText(/Widen two of them/)).toBeTruthy();
});
