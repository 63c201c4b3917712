import type { DesignDesk } from '@/client/analyse-pool.ts';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import type { OpenedDesign } from '@/core/designs/open-design.ts';
import type { DesignOutline } from '@/core/designs/questions/question.ts';
import { useQuestionRow } from './use-question-row.tsx';
import { useResolutionRow } from './use-resolution-row.tsx';

interface Props {
  opened: OpenedDesign;
  desk: DesignDesk;
  outline: DesignOutline;
  /** Told a resolution that was found. */
  onClasses(classes: Uint32Array): void;
}

/** What can be asked of the design; each is computed when asked for, with its time, and can be cancelled. */
export function QuestionList({ opened, desk, outline, onClasses }: Props) {
  const shared = { opened, desk, outline };
  const rows = [
    useQuestionRow(shared, 'intersections'),
    useResolutionRow(shared, onClasses),
    useQuestionRow(shared, 'twoRank'),
    useQuestionRow(shared, 'pasches'),
    useQuestionRow(shared, 'automorphisms'),
    useQuestionRow(shared, 'designCount'),
  ];
  return <TitleBlock title="On demand" showTitle rows={rows} />;
}
