import { counted } from '@/components/ui/numbers.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { fullShade } from './density.ts';
import { levelFor } from './view.ts';

interface Props {
  H: SparseMatrix;
  /** Device pixels a cell. */
  scale: number;
}

/** Says what a dark pixel means at this zoom. */
export function Legend({ H, scale }: Props) {
  const level = levelFor(scale);
  const side = 2 ** level;
  if (level === 0) {
    return (
      <p className="flex items-center gap-2 text-quiet text-tiny">
        <span className="inline-block size-3 bg-ink" /> a one
        <span className="ml-2 inline-block size-3 border border-rule bg-sheet" /> a zero
      </p>
    );
  }
  const full = fullShade(H, level);
  return (
    <p className="flex flex-wrap items-center gap-2 text-quiet text-tiny">
      <span className="inline-flex border border-rule" aria-hidden="true">
        {[0, 0.25, 0.5, 0.75, 1].map((shade) => (
          <span key={shade} className="size-3 bg-ink" style={{ opacity: shade }} />
        ))}
      </span>
      shade: ones in {side} × {side} cells, none to {counted(full, 'one')} or more
    </p>
  );
}
