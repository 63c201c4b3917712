import type { CandidateRow } from '@/api/catalogue.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { designTitle } from '@/core/designs/design-title.ts';

/** "Projective plane PG(2,16)", with the classes kept when not all are. */
export function titleOf({ design, keptClasses, checks }: CandidateRow): string {
  const kept = keptClasses === undefined ? '' : `, ${keptClasses} classes kept`;
  return `${designTitle(design as DesignSpec)}${kept}${checks === 'points' ? ', points as checks' : ''}`;
}

export interface Standing {
  word: string;
  kind: 'pass' | 'thin' | 'none';
}

/** How a candidate stands against what is stated: the first requirement that formulas leave open is named. */
export function standingOf({ verdicts }: CandidateRow): Standing {
  if (verdicts.length === 0) return { word: 'none stated', kind: 'none' };
  const open = verdicts.filter(({ outcome }) => outcome !== 'meets');
  if (open.length === 0) return { word: `meets ${verdicts.length} of ${verdicts.length}`, kind: 'pass' };
  return { word: `${open[0]!.requirement} open${open.length > 1 ? `, ${open.length - 1} more` : ''}`, kind: 'thin' };
}
