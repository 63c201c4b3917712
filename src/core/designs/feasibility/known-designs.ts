import type { Citation } from '../../errors.ts';
import { type FeasibilityRule, nameOf } from './rule.ts';

/** Single designs that no family here gives and that are in print. The citations are from memory. */
const known: readonly { key: string; source: Citation }[] = [
  {
    key: '2-(56,11,2)',
    source: {
      authors: 'M. Hall, R. Lane, D. Wales',
      year: 1970,
      title: 'Designs derived from permutation groups',
      where: 'J. Combin. Theory 8, 12–22',
    },
  },
  {
    key: '2-(79,13,2)',
    source: {
      authors: 'M. Aschbacher',
      year: 1971,
      title: 'On collineation groups of symmetric block designs',
      where: 'J. Combin. Theory A 11, 272–281',
    },
  },
];

export const knownDesigns: FeasibilityRule = {
  id: 'known-design',
  source: known[0]!.source,
  grants(query) {
    const found = known.find(({ key }) => key === nameOf(query));
    return found && !query.resolvable
      ? `A ${found.key} design is given by ${found.source.authors} (${found.source.year}).`
      : null;
  },
};

/** The paper that gives this one, in place of the list's own source. */
export const sourceOfKnown = (name: string): Citation | undefined => known.find(({ key }) => key === name)?.source;
