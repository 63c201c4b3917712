import type { ReactNode } from 'react';
import type { Grade as GradeName } from '@/core/evidence.ts';

const SHAPE: Record<GradeName, ReactNode> = {
  proved: <rect x="1.5" y="1.5" width="9" height="9" fill="currentColor" />,
  computed: <circle cx="6" cy="6" r="5" fill="currentColor" />,
  bounded: <path d="M4 1.5H1.5v9H4M8 1.5h2.5v9H8" fill="none" stroke="currentColor" strokeWidth="1.5" />,
  sampled: (
    <circle cx="6" cy="6" r="4.6" fill="none" stroke="currentColor" strokeWidth="1.5" strokeDasharray="2.2 1.4" />
  ),
};

const MEANING: Record<GradeName, string> = {
  proved: 'by a theorem whose hypotheses were checked on this object',
  computed: 'exhaustively, here',
  bounded: 'between a lower and an upper value',
  sampled: 'an estimate with an interval and a count',
};

export function GradeShape({ grade }: { grade: GradeName }) {
  return (
    <svg viewBox="0 0 12 12" className="size-[0.7rem] shrink-0" aria-hidden="true" data-grade={grade}>
      {SHAPE[grade]}
    </svg>
  );
}

interface Props {
  grade: GradeName;
  /** How it was found; shown on hover together with the grade's meaning. */
  method?: string;
}

/** How a value is known: always the shape and the word together. */
export function Grade({ grade, method }: Props) {
  return (
    <span
      className="inline-flex items-baseline gap-1.5 whitespace-nowrap font-sans font-semibold text-quiet text-tiny"
      title={method ? `${grade}, ${MEANING[grade]}: ${method}` : `${grade}: ${MEANING[grade]}`}
    >
      <GradeShape grade={grade} />
      {grade}
    </span>
  );
}
