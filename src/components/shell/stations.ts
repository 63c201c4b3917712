import type { Project } from '@/api/projects.ts';
import { counted } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';

/** The seven steps of the work, in order. */
export const STEPS = ['requirements', 'candidates', 'codes', 'runs', 'compare', 'sign-off', 'release'] as const;
export type Step = (typeof STEPS)[number];

export interface Station {
  step: Step;
  label: string;
  /** How the step stands, in two or three words. */
  state: string;
  /** Absent while the step has no page. */
  href?: string;
}

/** What the ruler shows for a project. */
export function stationsOf(project: Pick<Project, 'id' | 'counts'>): Station[] {
  const { id, counts } = project;
  return [
    {
      step: 'requirements',
      label: 'Requirements',
      state: counts.requirements === 0 ? 'none stated' : 'stated',
      href: paths.requirements(id),
    },
    { step: 'candidates', label: 'Candidates', state: 'the catalogue', href: paths.candidates(id) },
    {
      step: 'codes',
      label: 'Codes',
      state: counts.codes === 0 ? 'none kept' : `${counts.codes} kept`,
      href: paths.codes(id),
    },
    { step: 'runs', label: 'Runs', state: runState(counts), href: paths.runs(id) },
    {
      step: 'compare',
      label: 'Compare',
      state: counts.runs === 0 ? 'no points yet' : `points of ${counted(counts.runs, 'run')}`,
      href: paths.compare(id),
    },
    { step: 'sign-off', label: 'Sign-off', state: signOffState(counts), href: paths.signOffs(id) },
    {
      step: 'release',
      label: 'Release',
      state: counts.releases === 0 ? 'none yet' : `${counts.releases} frozen`,
      href: paths.releases(id),
    },
  ];
}

function signOffState({ signOffs, signOffsOpen }: Project['counts']): string {
  if (signOffs === 0) return 'none asked for';
  return signOffsOpen > 0 ? `${signOffsOpen} open` : `${signOffs} decided`;
}

function runState({ runs, runsUnderWay }: Project['counts']): string {
  if (runs === 0) return 'none yet';
  return runsUnderWay > 0 ? `${runsUnderWay} of ${runs} under way` : `${runs}, all at rest`;
}

/** Where a project is best entered: the first step that is not yet done, else the comparison. */
export function entryPath(project: Pick<Project, 'id' | 'counts'>): string {
  const { id, counts } = project;
  if (counts.requirements === 0) return paths.requirements(id);
  if (counts.codes === 0) return paths.codes(id);
  return counts.runs === 0 || counts.runsUnderWay > 0 ? paths.runs(id) : paths.compare(id);
}
