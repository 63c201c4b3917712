import type { ReactNode } from 'react';
import type { Grade as GradeName } from '@/core/evidence.ts';
import { classes } from './classes.ts';
import { Grade } from './Grade.tsx';

export interface TitleRow {
  label: ReactNode;
  value: ReactNode;
  grade?: GradeName;
  /** Method and source in small print beneath the value. */
  note?: ReactNode;
}

interface Props {
  rows: readonly TitleRow[];
  /** Names the block for assistive technology and, unless hidden, above it. */
  title: string;
  showTitle?: boolean;
  className?: string;
}

/** The title block of an engineering drawing: bordered, a label column, a value column, the grade beside the value. */
export function TitleBlock({ rows, title, showTitle = false, className }: Props) {
  return (
    <section aria-label={title} className={classes('min-w-0', className)}>
      {showTitle && <h2 className="mb-2">{title}</h2>}
      <dl className="border border-ink bg-sheet">
        {rows.map((row, at) => (
          <div
            // biome-ignore lint/suspicious/noArrayIndexKey: rows are a fixed listing, labels may be nodes
            key={at}
            className="grid grid-cols-[minmax(6rem,30%)_minmax(0,1fr)] border-rule border-b last:border-b-0"
          >
            <dt className="border-rule border-r px-2.5 py-1.5 text-quiet">{row.label}</dt>
            <dd className="px-2.5 py-1.5 font-semibold [overflow-wrap:anywhere]">
              <span className="flex flex-wrap items-baseline gap-x-3">
                <span>{row.value}</span>
                {row.grade && <Grade grade={row.grade} />}
              </span>
              {row.note && <span className="block font-normal text-quiet text-tiny">{row.note}</span>}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
