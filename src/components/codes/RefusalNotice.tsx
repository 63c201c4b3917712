import { Notice } from '@/components/ui/Notice.tsx';
import { citationText } from './citation-text.ts';
import type { Refusal } from './refusal.ts';

/** A refusal as the reader sees it: what forbids it, by which rule, and where that is published. */
export function RefusalNotice({ refusal }: { refusal: Refusal }) {
  if (refusal.kind === 'infeasible') {
    return (
      <Notice kind="fail" word="Impossible" live>
        {refusal.statement}
        <p className="mt-1.5 text-quiet text-tiny">
          Rule: {ruleName(refusal.rule)}.{refusal.source && <> Source: {citationText(refusal.source)}.</>}
        </p>
      </Notice>
    );
  }
  if (refusal.kind === 'param') {
    return (
      <Notice kind="caution" word="Not accepted" live>
        {refusal.param}: accepted is {refusal.accepted}.
      </Notice>
    );
  }
  return (
    <Notice kind="caution" word={refusal.kind === 'limit' ? 'Too large here' : 'Stopped'} live>
      {refusal.message}
    </Notice>
  );
}

const SPELT: Record<string, string> = {
  'bruck-ryser-chowla': 'Bruck–Ryser–Chowla theorem',
  'bruck-ryser': 'Bruck–Ryser theorem',
  divisibility: 'divisibility conditions',
  fisher: 'Fisher’s inequality',
};

/** A rule's id in words: "order-ten-search" reads "order ten search". */
function ruleName(rule: string): string {
  return SPELT[rule] ?? rule.replaceAll('-', ' ');
}
