import type { ReactNode } from 'react';
import type { DesignDesk } from '@/client/analyse-pool.ts';
import { RefusalNotice } from '@/components/codes/RefusalNotice.tsx';
import { Button } from '@/components/ui/Button.tsx';
import { duration } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import type { OpenedDesign } from '@/core/designs/open-design.ts';
import { designQuestions, type QuestionId } from '@/core/designs/questions/index.ts';
import type { DesignOutline } from '@/core/designs/questions/question.ts';
import { answerText, questionLabels } from './answer-text.tsx';
import { type AnswerState, useAnswer } from './use-answer.ts';

export interface Asked {
  opened: OpenedDesign;
  desk: DesignDesk;
  outline: DesignOutline;
}

/** A question as a line of a title block: a button, then progress with a way out, then the answer with its grade. */
export function useQuestionRow<Q extends QuestionId>({ opened, desk, outline }: Asked, question: Q): TitleRow {
  const { answer, ask, cancel } = useAnswer(desk, opened, question);
  const label = questionLabels[question];
  const obstacle = designQuestions[question].obstacle(outline);
  if (obstacle) return { label, value: <span className="font-normal text-quiet">{obstacle}</span> };
  if (answer.state === 'answered') return { label, ...answerText(question, answer.answer, outline, answer.elapsedMs) };
  return { label, value: <Unanswered label={label} answer={answer} onAsk={() => ask()} onCancel={cancel} /> };
}

interface Props {
  label: string;
  answer: Exclude<AnswerState<unknown>, { state: 'answered' }>;
  onAsk(): void;
  onCancel(): void;
  children?: ReactNode;
}

/** A question without its answer yet; `children` are what can be set before asking. */
export function Unanswered({ label, answer, onAsk, onCancel, children }: Props) {
  const name = label.replace('\u00ad', '').replace(/^[A-Z]/, (first) => first.toLowerCase());
  if (answer.state === 'working') {
    return (
      <span className="grid w-60 max-w-full gap-1.5 font-normal">
        <Progress label={`Computing: ${name}`} value={answer.share} left={duration(answer.elapsedMs)} />
        <Button size="small" onClick={onCancel} aria-label={`Cancel: ${name}`}>
          Cancel
        </Button>
      </span>
    );
  }
  return (
    <span className="grid justify-items-start gap-2 font-normal">
      {answer.state === 'refused' && (
        <>
          <RefusalNotice refusal={answer.refusal} />
          <span className="text-quiet text-tiny">after {duration(answer.elapsedMs)}</span>
        </>
      )}
      {children}
      <Button size="small" onClick={onAsk} aria-label={`Compute: ${name}`}>
        {answer.state === 'refused' ? 'Try again' : 'Compute'}
      </Button>
    </span>
  );
}
