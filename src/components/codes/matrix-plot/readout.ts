import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import type { PlotState } from './plot.ts';
import type { CellRange } from './view.ts';

/** "row 12, column 45: one", or for a square of cells "rows 16–31, columns 0–15: 3 ones". */
export function readoutText(under: PlotState['under']): string {
  if (!under) return 'Point at a cell, or move with the arrow keys, to read it.';
  const single = under.row1 - under.row0 === 1 && under.col1 - under.col0 === 1;
  if (single)
    return `row ${wholeNumber(under.row0)}, column ${wholeNumber(under.col0)}: ${under.ones === 1 ? 'one' : 'zero'}`;
  return `${spanText('row', under.row0, under.row1)}, ${spanText('column', under.col0, under.col1)}: ${counted(under.ones, 'one')}`;
}

/** "rows 0–272, columns 0–272": what is on the canvas, counted from 0. */
export function visibleText(visible: CellRange): string {
  return `${spanText('row', visible.row0, visible.row1)}, ${spanText('column', visible.col0, visible.col1)}`;
}

function spanText(word: string, from: number, to: number): string {
  return to - from <= 1 ? `${word} ${wholeNumber(from)}` : `${word}s ${wholeNumber(from)}–${wholeNumber(to - 1)}`;
}
