import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, expect, test } from 'vitest';
import { TannerDrawing } from '@/components/codes/tanner/TannerGraph.tsx';
import { isDrawable, neighboursOf, tannerLayout } from '@/components/codes/tanner/tanner-layout.ts';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';

afterEach(cleanup);
const H = matrixFromRows(4, [
  [0, 1, 3],
  [1, 2],
]);

test('every one is an edge, and neighbours are read from either side', () => {
  const layout = tannerLayout(H);
  expect(layout.edges).toHaveLength(5);
  expect(neighboursOf(layout, { kind: 'bit', index: 1 })).toEqual([0, 1]);
  expect(neighboursOf(layout, { kind: 'check', index: 0 })).toEqual([0, 1, 3]);
  expect([isDrawable(100, 100), isDrawable(101, 100)]).toEqual([true, false]);
});

test('arrow keys choose a node and its neighbours are said', () => {
  render(<TannerDrawing H={H} />);
  const drawing = screen.getByRole('img', { name: /4 bits above, 2 checks beneath, 5 edges/ });
  fireEvent.keyDown(drawing, { key: 'ArrowRight' });
  fireEvent.keyDown(drawing, { key: 'ArrowRight' });
  expect(screen.getByText('Bit 1: checks 0, 1.')).toBeTruthy();
  fireEvent.keyDown(drawing, { key: 'ArrowDown' });
  expect(screen.getByText('Check 0: bits 0, 1, 3.')).toBeTruthy();
});
