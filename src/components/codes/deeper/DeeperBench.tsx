import { useState } from 'react';
import type { Analysis } from '@/api/analyses.ts';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField } from '@/components/ui/fields.tsx';
import { duration } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { questionCards } from '@/core/codes/questions/cards.ts';
import type { CodeOutline } from '@/core/codes/questions/question.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import { RefusalNotice } from '../RefusalNotice.tsx';
import { AnswerBlock } from './AnswerBlock.tsx';
import { EarlierAnalysis, KeptAnalysis } from './KeptAnalysis.tsx';
import { type Examined, useExamination } from './use-examination.ts';
import { useKeptAnalysis } from './use-kept-analysis.ts';

interface Props {
  code: Examined;
  outline: CodeOutline;
  /** Engineers and owners keep what is found; it is then computed on the server. */
  mayKeep: boolean;
  /** What was asked before, newest first. */
  earlier: readonly Analysis[];
  questions: readonly CodeQuestionId[];
}

const BUDGETS = [1, 10, 60, 600];

/** What more can be found out about a code, each asked for, with a budget, a progress and a way out. */
export default function DeeperBench({ code, outline, mayKeep, earlier, questions }: Props) {
  const [seconds, setSeconds] = useState(10);
  return (
    <div className="grid grid-cols-1 gap-4">
      {questions.some((id) => questionCards[id].searches) && (
        <SelectField
          className="w-56"
          label="a search may spend"
          hint="counted in operations: the same answer on every machine"
          value={String(seconds)}
          choices={BUDGETS.map((budget) => ({ value: String(budget), label: `about ${duration(budget * 1000)}` }))}
          onChange={(event) => setSeconds(Number(event.target.value))}
        />
      )}
      {questions.map((id) => (
        <Question
          key={id}
          id={id}
          code={code}
          outline={outline}
          mayKeep={mayKeep}
          earlier={earlier.filter(({ question }) => question === id)}
          seconds={seconds}
        />
      ))}
    </div>
  );
}

interface QuestionProps extends Omit<Props, 'questions'> {
  id: CodeQuestionId;
  seconds: number;
}

function Question({ id, code, outline, mayKeep, earlier, seconds }: QuestionProps) {
  const { examination, ask, cancel } = useExamination(code, id);
  const [open] = useState(() => earlier.find(({ state }) => state === 'working'));
  const server = useKeptAnalysis(code.id, id, open);
  const { title, searches, obstacle } = questionCards[id];
  const unfit = obstacle(outline);
  const told = earlier.find(({ lines }) => lines.length > 0);
  const isIdle = examination.state !== 'working' && server.kept.state !== 'working';
  return (
    <section aria-label={title} className="grid grid-cols-1 gap-2 border-rule border-t pt-3">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <h3 className="font-semibold">{title}</h3>
        {!unfit && isIdle && (
          <span className="flex flex-wrap gap-2">
            <Button size="small" onClick={() => void ask(seconds)} aria-label={`Compute: ${title}`}>
              {examination.state === 'answered' ? (searches ? 'Search again' : 'Compute again') : 'Compute'}
            </Button>
            {mayKeep && (
              <Button size="small" onClick={() => server.start(seconds)} aria-label={`Compute and keep: ${title}`}>
                Compute and keep
              </Button>
            )}
          </span>
        )}
      </div>
      {unfit && <p className="text-quiet text-tiny">{unfit}.</p>}
      {told && <EarlierAnalysis analysis={told} searches={searches} />}
      <KeptAnalysis title={title} kept={server.kept} onCancel={() => void server.cancel()} />
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
        <AnswerBlock title={title} answer={examination.answer} elapsedMs={examination.elapsedMs} />
      )}
    </section>
  );
}
