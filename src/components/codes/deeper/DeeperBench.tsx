import { lazy, Suspense, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { saveFile } from '@/components/runs/save-file.ts';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField } from '@/components/ui/fields.tsx';
import { duration } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import { type CodeQuestionId, codeQuestionIds, codeQuestions } from '@/core/codes/questions/index.ts';
import type { CodeAnswer, CodeOutline } from '@/core/codes/questions/question.ts';
import { RefusalNotice } from '../RefusalNotice.tsx';
import { useExamination } from './use-examination.ts';

const WeightBars = lazy(() => import('../WeightBars.tsx'));

interface Props {
  code: Pick<Code, 'id' | 'fingerprint' | 'design' | 'derivation'>;
  outline: CodeOutline;
}

const BUDGETS = [1, 10, 60, 600];

/** What more can be found out about a code, each asked for, with a budget, a progress and a way out. */
export default function DeeperBench({ code, outline }: Props) {
  const [seconds, setSeconds] = useState(10);
  return (
    <div className="grid gap-4">
      <SelectField
        className="w-56"
        label="a search may spend"
        hint="counted in operations: the same answer on every machine"
        value={String(seconds)}
        choices={BUDGETS.map((budget) => ({ value: String(budget), label: `about ${duration(budget * 1000)}` }))}
        onChange={(event) => setSeconds(Number(event.target.value))}
      />
      {codeQuestionIds.map((id) => (
        <Question key={id} id={id} code={code} outline={outline} seconds={seconds} />
      ))}
    </div>
  );
}

interface QuestionProps extends Props {
  id: CodeQuestionId;
  seconds: number;
}

function Question({ id, code, outline, seconds }: QuestionProps) {
  const { examination, ask, cancel } = useExamination(code, id);
  const { title, searches, obstacle } = codeQuestions[id];
  const unfit = obstacle(outline);
  return (
    <section aria-label={title} className="grid gap-2 border-rule border-t pt-3">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h3 className="font-semibold">{title}</h3>
        {!unfit && examination.state !== 'working' && (
          <Button size="small" onClick={() => void ask(seconds)} aria-label={`Compute: ${title}`}>
            {examination.state === 'answered' ? (searches ? 'Search again' : 'Compute again') : 'Compute'}
          </Button>
        )}
      </div>
      {unfit && <p className="text-quiet text-tiny">{unfit}.</p>}
      {examination.state === 'working' && (
        <div className="flex flex-wrap items-center gap-3">
          <div className="w-60 max-w-full">
            <Progress label={`Computing: ${title}`} value={examination.share} left={duration(examination.elapsedMs)} />
          </div>
          <Button size="small" onClick={cancel} aria-label={`Cancel: ${title}`}>
            Cancel
          </Button>
        </div>
      )}
      {examination.state === 'refused' && <RefusalNotice refusal={examination.refusal} />}
      {examination.state === 'answered' && (
        <Answer title={title} answer={examination.answer} elapsedMs={examination.elapsedMs} />
      )}
    </section>
  );
}

function Answer({ title, answer, elapsedMs }: { title: string; answer: CodeAnswer; elapsedMs: number }) {
  const { lines, list, histogram } = answer;
  return (
    <div className="grid gap-2" role="status">
      <TitleBlock
        title={title}
        rows={lines.map(({ label, text, grade, method, source }) => ({
          label,
          value: text,
          grade,
          note: source ? `${method}; ${source}` : method,
        }))}
      />
      {histogram && histogram.bars.length > 1 && (
        <figure className="min-w-0">
          <figcaption className="text-tiny">{histogram.of}</figcaption>
          <Suspense fallback={null}>
            <WeightBars of="column" weights={histogram.bars} axis={histogram.of} />
          </Suspense>
        </figure>
      )}
      {histogram?.bars.length === 1 && (
        <p className="text-tiny">
          {histogram.of}: {histogram.bars[0]![0]}, the same through every bit.
        </p>
      )}
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
