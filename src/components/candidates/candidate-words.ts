import type { CandidateRow } from '@/api/catalogue.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { designTitle } from '@/core/designs/design-title.ts';

type Named = Pick<CandidateRow, 'design' | 'keptClasses' | 'checks' | 'transforms'>;

/** The design alone: "Projective plane PG(2,16)". */
export const designOf = ({ design }: Pick<CandidateRow, 'design'>) => designTitle(design as DesignSpec);

/** How the code comes from it: "one check a point, 5 classes kept, shortened by 63". */
export function derivationOf({ keptClasses, checks, transforms }: Named): string {
  const shortened = transforms.find(({ kind }) => kind === 'shorten')?.bits;
  return [
    `one check a ${checks === 'blocks' ? 'block' : 'point'}`,
    ...(keptClasses === undefined ? [] : [`${keptClasses} classes kept`]),
    ...(shortened === undefined ? [] : [`shortened by ${shortened}`]),
  ].join(', ');
}

/** Both, where a line has room for them. */
export const titleOf = (row: Named) => `${designOf(row)}, ${derivationOf(row)}`;

export interface Standing {
  word: string;
  kind: 'pass' | 'thin' | 'none';
}

/** How a candidate stands against what is stated: the first requirement that formulas leave open is named. */
export function standingOf({ verdicts }: CandidateRow): Standing {
  if (verdicts.length === 0) return { word: 'none stated', kind: 'none' };
  const open = verdicts.filter(({ outcome }) => outcome !== 'meets');
  if (open.length === 0) return { word: `meets ${verdicts.length} of ${verdicts.length}`, kind: 'pass' };
  return { word: `${open[0]!.requirement} open${open.length > 1 ? `, +${open.length - 1}` : ''}`, kind: 'thin' };
}

export const structureOf = ({ structure, resolvable }: CandidateRow): string =>
  structure === 'none' ? (resolvable ? 'resolvable' : 'none') : structure;
