import type { Run } from '@/api/runs.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { goalText, VERDICT_WORD } from './goal-text.ts';

/** What a run is for, and what came of it; nothing where points were stated one by one. */
export function GoalBlock({ run: { goal, outcome } }: { run: Run }) {
  if (!goal) return null;
  return (
    <section aria-label="Goal" className="grid gap-2">
      <p>
        <span className="text-quiet">Goal: </span>
        {goalText(goal)}.
      </p>
      {outcome && (
        <Notice kind={NOTICE[outcome.verdict]} word={VERDICT_WORD[outcome.verdict]} live>
          {outcome.text}
        </Notice>
      )}
    </section>
  );
}

const NOTICE = { pass: 'pass', fail: 'fail', open: 'caution', complete: 'note' } as const;
