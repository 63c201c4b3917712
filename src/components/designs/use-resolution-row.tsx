import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField, TextField } from '@/components/ui/fields.tsx';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { DEFAULT_RESOLUTION_NODES } from '@/core/designs/resolve.ts';
import { answerText, questionLabels } from './answer-text.tsx';
import { useAnswer } from './use-answer.ts';
import { type Asked, Unanswered } from './use-question-row.tsx';

const limits = [1, 10, 100, 1000].map((times) => times * DEFAULT_RESOLUTION_NODES);

/** Resolution has a seed and a budget to set; where the budget ended, it can be asked again with more. */
export function useResolutionRow(
  { opened, desk, outline }: Asked,
  onClasses: (classes: Uint32Array) => void,
): TitleRow {
  const { answer, ask, cancel } = useAnswer(desk, opened, 'resolution');
  const [seed, setSeed] = useState('1');
  const [limit, setLimit] = useState(limits[0]!);
  const label = questionLabels.resolution;
  const found = answer.state === 'answered' ? answer.answer.classes : null;
  useEffect(() => {
    if (found) onClasses(found);
  }, [found, onClasses]);
  const start = () => ask({ seed: seed.trim() || '1', limit });
  const settings = (
    <span className="grid w-full gap-3 sm:grid-cols-2">
      <TextField label="seed" value={seed} maxLength={64} onChange={(event) => setSeed(event.target.value)} />
      <SelectField
        label="search nodes"
        value={String(limit)}
        choices={limits.map((value) => ({ value: String(value), label: `${value / 1e6} million` }))}
        onChange={(event) => setLimit(Number(event.target.value))}
      />
    </span>
  );
  if (answer.state !== 'answered') {
    return {
      label,
      value: (
        <Unanswered label={label} answer={answer} onAsk={start} onCancel={cancel}>
          {opened.isResolved ? <span className="text-quiet">given by the construction</span> : settings}
        </Unanswered>
      ),
    };
  }
  const row = answerText('resolution', answer.answer, outline, answer.elapsedMs);
  if (answer.answer.resolvable.value !== 'undecided') return { label, ...row };
  return {
    label,
    ...row,
    note: (
      <>
        {row.note}
        <span className="mt-2 grid justify-items-start gap-2">
          {settings}
          <Button size="small" onClick={start}>
            Search again
          </Button>
        </span>
      </>
    ),
  };
}
