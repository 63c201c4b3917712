import type { ReactNode } from 'react';
import { citationText } from '@/components/codes/citation-text.ts';
import { enclosureText } from '@/components/codes/enclosure-text.ts';
import { counted, duration, scientific, superscript, wholeNumber } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import type { AsymptoticCount } from '@/core/designs/design-counts.ts';
import type { AutomorphismAnswer } from '@/core/designs/questions/automorphisms.ts';
import type { AnswerTo, QuestionId } from '@/core/designs/questions/index.ts';
import type { IntersectionCounts } from '@/core/designs/questions/intersections.ts';
import type { DesignOutline } from '@/core/designs/questions/question.ts';
import type { ResolutionAnswer } from '@/core/designs/questions/resolution.ts';
import type { TwoRankAnswer } from '@/core/designs/questions/two-rank.ts';
import type { Graded } from '@/core/evidence.ts';

export const questionLabels: Record<QuestionId, string> = {
  intersections: 'Block intersections',
  resolution: 'Resolution',
  twoRank: 'Rank over GF(2)',
  pasches: 'Pasch count',
  automorphisms: 'Auto\u00admorphism group',
  designCount: 'Designs like it',
};

type Shown = Omit<TitleRow, 'label'>;
type Writers = { [Q in QuestionId]: (answer: AnswerTo<Q>, outline: DesignOutline) => Shown };

const writers: Writers = {
  intersections: intersectionsText,
  resolution: resolutionText,
  twoRank: twoRankText,
  pasches: (count) => ({ ...graded(count), value: wholeNumber(count.value) }),
  automorphisms: automorphismsText,
  designCount: designCountText,
};

/** An answer as a line of a title block: the value, how it is known, and the time it took. */
export function answerText<Q extends QuestionId>(
  question: Q,
  answer: AnswerTo<Q>,
  outline: DesignOutline,
  elapsedMs: number,
): Shown {
  const { note, ...shown } = writers[question](answer, outline);
  return {
    ...shown,
    note: (
      <>
        {note}
        {note ? ' ' : ''}
        <span className="whitespace-nowrap">Took {elapsedMs < 1 ? 'under 1 ms' : duration(elapsedMs)}.</span>
      </>
    ),
  };
}

function graded({ grade, method, source }: Graded<unknown>): { grade: Graded<unknown>['grade']; note: string } {
  return {
    grade,
    note: `${method.replace(/\d{5,}/g, (digits) => wholeNumber(Number(digits)))}${source ? `; ${citationText(source)}` : ''}.`,
  };
}

function intersectionsText(counts: Graded<IntersectionCounts>): Shown {
  return {
    ...graded(counts),
    value: (
      <span className="grid">
        {counts.value.map(([size, pairs]) => (
          <span key={size}>
            {counted(pairs, 'pair')} {size === 0 ? 'apart' : `in ${counted(size, 'point')}`}
          </span>
        ))}
        {counts.value.length === 0 && 'no two blocks'}
      </span>
    ),
  };
}

function resolutionText({ resolvable, classCount }: ResolutionAnswer): Shown {
  const words = {
    yes: counted(classCount, 'parallel class', 'parallel classes'),
    no: 'none',
    undecided: 'not decided',
  };
  return { ...graded(resolvable), value: words[resolvable.value] };
}

function twoRankText({ rank, formula }: TwoRankAnswer): Shown {
  const { grade, note } = graded(rank);
  return {
    grade,
    value: wholeNumber(rank.value),
    note: `${note}${formula ? ` ${formulaText(rank.value, formula)}` : ''}`,
  };
}

function formulaText(rank: number, { value, method }: NonNullable<TwoRankAnswer['formula']>): string {
  if (rank < value.lower || rank > value.upper)
    return `The formula says ${enclosureText(value)} and is contradicted (${method}).`;
  return value.lower === value.upper
    ? `The formula agrees (${method}).`
    : `Formulas allow ${enclosureText(value)} (${method}).`;
}

function automorphismsText({ order, copies, base, generatorCount }: AutomorphismAnswer, { v }: DesignOutline): Shown {
  const orbits = base.map(({ orbitSize }) => orbitSize).join(' · ');
  return {
    grade: order.grade,
    value: <>order {wholeNumber(order.value)}</>,
    note: (
      <>
        {order.method}
        {base.length > 0 && <>; orbits {orbits}</>}, {counted(generatorCount, 'generator')}.{' '}
        <span className="block [overflow-wrap:anywhere]">
          Labelled copies v!/|Aut| = {v}!/{wholeNumber(order.value)} = {bigText(copies.value)}, {copies.grade}.
        </span>
      </>
    ),
  };
}

/** Up to fifteen digits whole; longer ones as a power of ten, then whole. */
function bigText(value: bigint): ReactNode {
  const digits = String(value);
  if (digits.length <= 15) return wholeNumber(value);
  const mantissa = (Number(digits.slice(0, 4)) / 1000).toFixed(2);
  return (
    <>
      {mantissa}&#x202f;×&#x202f;10{superscript(digits.length - 1)}, exactly {digits}
    </>
  );
}

/** Always marked as what it is: the theorem speaks of v → ∞ and gives no error for one v. */
function designCountText({ log10, formula, source }: AsymptoticCount): Shown {
  return {
    value: (
      <>
        {estimateOf(log10)}{' '}
        <span className="whitespace-nowrap font-semibold text-thin text-tiny">≈ asymptotic estimate, not a count</span>
      </>
    ),
    note: `Leading term of ${formula}, designs on the same named points; it says how the number grows with v and has no error term for one v. ${citationText(source)}.`,
  };
}

function estimateOf(log10: number): string {
  if (log10 < 0) return 'the leading term is below 1';
  return log10 < 5 ? `about ${scientific(10 ** log10, 2)}` : `about 10${superscript(Math.round(log10))}`;
}
