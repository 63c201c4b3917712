import { lazy, Suspense } from 'react';
import { saveFile } from '@/components/runs/save-file.ts';
import { Button } from '@/components/ui/Button.tsx';
import { DataTable } from '@/components/ui/DataTable.tsx';
import { duration, wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import type { AnswerTable, CodeAnswer } from '@/core/codes/questions/question.ts';

const WeightBars = lazy(() => import('../WeightBars.tsx'));

interface Props {
  title: string;
  answer: CodeAnswer;
  elapsedMs: number;
}

/** What an analysis in this browser told: each value with its grade, method and source, and the list as a file. */
export function AnswerBlock({ title, answer, elapsedMs }: Props) {
  const { lines, list, histogram, table } = answer;
  return (
    <div className="grid grid-cols-1 gap-2" role="status">
      {table && <Compared {...table} />}
      <TitleBlock
        title={title}
        rows={lines.map(({ label, text, grade, method, source }) => ({
          label,
          value: text,
          grade,
          note: source ? `${method}; ${source}` : method,
        }))}
      />
      {histogram && <Histogram {...histogram} />}
      <p className="flex flex-wrap items-center gap-x-4 text-quiet text-tiny">
        <span>Took {duration(elapsedMs)}.</span>
        {list && (
          <Button size="small" onClick={() => saveFile(list.fileName, 'text/csv', list.text)}>
            Download the list
          </Button>
        )}
      </p>
    </div>
  );
}

/** Values side by side; numbers are set right so that digits line up. */
export function Compared({ of, columns, rows }: AnswerTable) {
  return (
    <DataTable
      caption={of}
      columns={columns.map((header, at) => ({
        key: header,
        header,
        kind: typeof rows[0]?.[at] === 'number' ? 'number' : 'text',
        cell: (row: AnswerTable['rows'][number]) => cellText(row[at]),
        sortBy: (row: AnswerTable['rows'][number]) => row[at] ?? '',
      }))}
      rows={rows}
      rowKey={(row) => row.slice(0, 2).join(' ')}
    />
  );
}

const cellText = (value: string | number | undefined) => (typeof value === 'number' ? wholeNumber(value) : value);

export function Histogram({ of, bars }: NonNullable<CodeAnswer['histogram']>) {
  if (bars.length === 1) {
    return (
      <p className="text-tiny">
        {of}: {bars[0]![0]}, the same through every bit.
      </p>
    );
  }
  return (
    <figure className="min-w-0">
      <figcaption className="text-tiny">{of}</figcaption>
      <Suspense fallback={null}>
        <WeightBars of="column" weights={bars} axis={of} />
      </Suspense>
    </figure>
  );
}
