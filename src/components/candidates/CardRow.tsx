import type { ReactNode } from 'react';
import { classes } from '@/components/ui/classes.ts';
import { Grade } from '@/components/ui/Grade.tsx';
import { derivationOf, designOf, titleOf } from './candidate-words.ts';
import type { RowProps } from './TableRow.tsx';
import { Stands, tableColumns } from './table-columns.tsx';

export const cardHeightPx = 108;

const second = tableColumns.filter(({ key }) => ['n', 'k', 'rate', 'girth'].includes(key));

/** A candidate on a narrow screen: three lines in place of a row of columns. */
export function CardRow({ row, index, top, isChosen, onChoose }: RowProps) {
  const { distance } = row;
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
        'absolute inset-x-0 grid h-27 cursor-pointer content-center gap-0.5 border-hair border-b px-1',
        isChosen ? 'bg-tint' : 'hover:bg-sheet',
      )}
      style={{ transform: `translateY(${top}px)` }}
    >
      {/* biome-ignore lint/a11y/useSemanticElements: as above */}
      {/* biome-ignore lint/a11y/useFocusableInteractive: as above */}
      <div role="rowheader" className="min-w-0" title={titleOf(row)}>
        <span className="block truncate font-semibold">{designOf(row)}</span>
        <span className="block truncate text-quiet text-tiny">{derivationOf(row)}</span>
      </div>
      <Line>
        {second.map(({ key, label, cell }) => (
          <span key={key} className="whitespace-nowrap">
            <span className="font-sans text-quiet text-tiny">{label}</span> {cell(row)}
          </span>
        ))}
      </Line>
      <Line>
        <span className="flex items-baseline gap-1.5 whitespace-nowrap">
          <span className="font-sans text-quiet text-tiny">distance</span>
          {distance.lower === distance.upper ? distance.lower : `≥\u202f${distance.lower}`}
          <Grade grade={distance.grade} method={distance.method} />
        </span>
        {row.verdicts.length > 0 && (
          <span className="ml-auto truncate font-sans">
            <Stands row={row} />
          </span>
        )}
      </Line>
    </div>
  );
}

function Line({ children }: { children: ReactNode }) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: as above
    <div role="cell" className="flex items-baseline gap-x-3 overflow-hidden font-mono">
      {children}
    </div>
  );
}
