import { type SubmitEvent, useState } from 'react';
import type { z } from 'zod';
import type { feasibilityAnswerSchema } from '@/api/catalogue.ts';
import { endpoints } from '@/api/endpoints.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { citationFrom, citationText } from '@/components/codes/citation-text.ts';
import { Button } from '@/components/ui/Button.tsx';
import { NumberField } from '@/components/ui/fields.tsx';
import { Notice, type NoticeKind } from '@/components/ui/Notice.tsx';

type Answer = z.output<typeof feasibilityAnswerSchema>;
const fields = ['t', 'v', 'k', 'lambda'] as const;
const kinds: Record<Answer['verdict'], NoticeKind> = { exists: 'pass', impossible: 'fail', open: 'caution' };

/** Asks whether any t-(v,k,λ) design exists at all, and by which theorem. */
export function FeasibilityForm() {
  const [text, setText] = useState({ t: '2', v: '', k: '', lambda: '1' });
  const [answer, setAnswer] = useState<Answer | null>(null);
  const [failure, setFailure] = useState<ApiFailure | null>(null);
  const ask = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    setAnswer(null);
    setFailure(null);
    try {
      const body = { t: Number(text.t), v: Number(text.v), k: Number(text.k), lambda: Number(text.lambda) };
      setAnswer(await call(endpoints.feasibility, { body }));
    } catch (error) {
      if (!(error instanceof ApiFailure)) throw error;
      setFailure(error);
    }
  };
  return (
    <form onSubmit={ask} className="grid gap-3 border-rule border-t pt-4" aria-label="Does a design exist?">
      <h2>Does a t-(v, k, λ) design exist?</h2>
      <div className="grid grid-cols-4 gap-3">
        {fields.map((name) => (
          <NumberField
            key={name}
            label={name === 'lambda' ? 'λ' : name}
            inputMode="numeric"
            value={text[name]}
            error={failure?.fields[name]}
            onChange={(event) => setText({ ...text, [name]: event.target.value })}
          />
        ))}
      </div>
      <Button type="submit">Ask</Button>
      {failure && Object.keys(failure.fields).length === 0 && (
        <Notice kind="caution" word="Not answered" live>
          {failure.message}
        </Notice>
      )}
      {answer && <Verdict answer={answer} />}
    </form>
  );
}

function Verdict({ answer: { verdict, words, reasons } }: { answer: Answer }) {
  return (
    <Notice kind={kinds[verdict]} word={words[0]!.toUpperCase() + words.slice(1)} live>
      {reasons.map(({ rule, statement, source }) => {
        const citation = citationFrom(source);
        return (
          <span key={rule} className="mt-1 block">
            {statement}
            {citation && <span className="block text-quiet text-tiny">{citationText(citation)}</span>}
          </span>
        );
      })}
    </Notice>
  );
}
