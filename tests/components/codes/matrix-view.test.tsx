import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readoutText } from '@/components/codes/matrix-plot/readout.ts';
import {
  cellsUnder,
  type Frame,
  LARGEST_CELL,
  levelFor,
  panBy,
  viewFromText,
  viewToText,
  visibleCells,
  wholeScale,
  wholeView,
  zoomAt,
} from '@/components/codes/matrix-plot/view.ts';

const frame: Frame = { width: 900, height: 600, rows: 273, cols: 273 };
const frames = fc.record({
  width: fc.integer({ min: 100, max: 3000 }),
  height: fc.integer({ min: 100, max: 3000 }),
  rows: fc.integer({ min: 1, max: 16513 }),
  cols: fc.integer({ min: 1, max: 16513 }),
});

describe('the part of a matrix that is shown', () => {
  test('the whole view shows every row and column', () => {
    fc.assert(
      fc.property(frames, (f) => {
        expect(visibleCells(wholeView(f), f)).toEqual({ row0: 0, row1: f.rows, col0: 0, col1: f.cols });
      }),
    );
  });

  test('the cell under the pointer stays there while zooming in, away from the edges', () => {
    const before = zoomAt(wholeView(frame), frame, 4, 450, 300);
    const after = zoomAt(before, frame, 2, 450, 300);
    expect(cellsUnder(after, frame, 450, 300)).toEqual(cellsUnder(before, frame, 450, 300));
  });

  test('zoom keeps between the whole matrix and the largest cell, and never leaves the matrix', () => {
    const moves = fc.array(
      fc.record({ factor: fc.double({ min: 0.1, max: 10, noNaN: true }), dx: fc.integer({ min: -4000, max: 4000 }) }),
      { maxLength: 12 },
    );
    fc.assert(
      fc.property(frames, moves, (f, steps) => {
        let view = wholeView(f);
        for (const { factor, dx } of steps) {
          view = panBy(zoomAt(view, f, factor, f.width / 3, f.height / 2), f, dx, -dx);
          expect(view.scale).toBeGreaterThanOrEqual(wholeScale(f) * 0.999999);
          expect(view.scale).toBeLessThanOrEqual(LARGEST_CELL);
          const seen = visibleCells(view, f);
          expect(seen.row1).toBeGreaterThan(seen.row0);
          expect(seen.col1).toBeGreaterThan(seen.col0);
        }
      }),
    );
  });

  test('a view written into an address comes back as it was', () => {
    const view = panBy(zoomAt(wholeView(frame), frame, 6, 200, 100), frame, -37, 12);
    const back = viewFromText(viewToText(view, frame), frame)!;
    expect(back.scale).toBeCloseTo(view.scale, 3);
    expect(back.x).toBeCloseTo(view.x, 2);
    expect(back.y).toBeCloseTo(view.y, 2);
  });

  test.each([null, '', 'abc', '1_2', '1_2_-3', '1_2_0', 'NaN_1_1'])(
    'an address that says %j shows the whole',
    (text) => {
      expect(viewFromText(text, frame)).toBeNull();
    },
  );

  test('cells smaller than a pixel are taken together in squares of a power of two', () => {
    expect([1, 0.6, 0.5, 0.25, 1 / 16].map(levelFor)).toEqual([0, 1, 1, 2, 4]);
  });

  test('outside the matrix there is nothing to read', () => {
    expect(cellsUnder(wholeView(frame), frame, 2, 300)).toBeNull();
  });
});

describe('the readout', () => {
  test('names a single cell and its value', () => {
    expect(readoutText({ row0: 12, row1: 13, col0: 45, col1: 46, ones: 1 })).toBe('row 12, column 45: one');
    expect(readoutText({ row0: 12, row1: 13, col0: 45, col1: 46, ones: 0 })).toBe('row 12, column 45: zero');
  });

  test('counts the ones of a square of cells', () => {
    expect(readoutText({ row0: 16384, row1: 16400, col0: 0, col1: 16, ones: 3 })).toBe(
      'rows 16\u202f384–16\u202f399, columns 0–15: 3 ones',
    );
  });
});
