import type { CandidateRow } from '@/api/catalogue.ts';
import { classes } from '@/components/ui/classes.ts';
import { derivationOf, designOf, titleOf } from './candidate-words.ts';
import type { TableColumn } from './table-columns.tsx';

export const rowHeightPx = 52;

export interface RowProps {
  row: CandidateRow;
  index: number;
  top: number;
  isChosen: boolean;
  onChoose(): void;
}

interface Props extends RowProps {
  columns: readonly TableColumn[];
  template: string;
}

export function TableRow({ row, index, top, isChosen, onChoose, columns, template }: Props) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: only the rows in view exist, which a table element cannot say
    // biome-ignore lint/a11y/useFocusableInteractive: the row group takes the focus
    // biome-ignore lint/a11y/useKeyWithClickEvents: the row group takes the keys
    <div
      role="row"
      aria-rowindex={index + 2}
      aria-selected={isChosen}
      onClick={onChoose}
      className={classes(
        'absolute inset-x-0 grid h-13 cursor-pointer items-baseline gap-x-3 border-hair border-b',
        isChosen ? 'bg-tint' : 'hover:bg-sheet',
      )}
      style={{ gridTemplateColumns: template, transform: `translateY(${top}px)` }}
    >
      {/* biome-ignore lint/a11y/useSemanticElements: as above */}
      {/* biome-ignore lint/a11y/useFocusableInteractive: as above */}
      <div role="rowheader" className="min-w-0 py-1.5" title={titleOf(row)}>
        <span className="block truncate">{designOf(row)}</span>
        <span className="block truncate text-quiet text-tiny">{derivationOf(row)}</span>
      </div>
      {columns.map(({ key, number, cell }) => (
        // biome-ignore lint/a11y/useSemanticElements: as above
        <div key={key} role="cell" className={classes('truncate py-1.5', number && 'text-right font-mono')}>
          {cell(row)}
        </div>
      ))}
    </div>
  );
}
