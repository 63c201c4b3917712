import type { Citation } from '../../errors.ts';
import { type FeasibilityRule, nameOf } from './rule.ts';

interface Exception {
  key: string;
  source: Citation;
}

/** Parameters that pass every general theorem and were shown impossible one by one. The citations are from memory. */
const exceptions: readonly Exception[] = [
  {
    key: '2-(111,11,1)',
    source: {
      authors: 'C. W. H. Lam, L. Thiel, S. Swiercz',
      year: 1989,
      title: 'The non-existence of finite projective planes of order 10',
      where: 'Canad. J. Math. 41, 1117–1123',
    },
  },
  {
    key: '4-(17,5,1)',
    source: {
      authors: 'P. R. J. Östergård, O. Pottonen',
      year: 2008,
      title: 'There exists no Steiner system S(4,5,17)',
      where: 'J. Combin. Theory A 115, 1570–1573',
    },
  },
  {
    key: '4-(15,5,1)',
    source: {
      authors: 'N. S. Mendelsohn, S. H. Y. Hung',
      year: 1972,
      title: 'On the Steiner systems S(3,4,14) and S(4,5,15)',
      where: 'Utilitas Math. 1, 5–95',
    },
  },
  {
    key: '4-(18,6,1)',
    source: {
      authors: 'E. Witt',
      year: 1938,
      title: 'Über Steinersche Systeme',
      where: 'Abh. Math. Sem. Hamburg 12, 265–275',
      part: 'the unique S(3,5,17) has no extension',
    },
  },
  {
    key: '2-(46,6,1)',
    source: {
      authors: 'S. K. Houghten, L. H. Thiel, J. Janssen, C. W. H. Lam',
      year: 2001,
      title: 'There is no (46,6,1) block design',
      where: 'J. Combin. Des. 9, 60–71',
    },
  },
  {
    key: '2-(22,8,4)',
    source: {
      authors: 'R. Bilous and others',
      year: 2007,
      title: 'There is no 2-(22,8,4) block design',
      where: 'J. Combin. Des. 15, 262–267',
    },
  },
];

/** Resolvable designs that are impossible although the bare design exists. */
const unresolvable: readonly Exception[] = [
  {
    key: '2-(6,3,2)',
    source: {
      authors: 'H. Hanani',
      year: 1974,
      title: 'On resolvable balanced incomplete block designs',
      where: 'J. Combin. Theory A 17, 275–289',
    },
  },
];

export const knownExceptions: FeasibilityRule = {
  id: 'known-exception',
  source: exceptions[0]!.source,
  forbids(query) {
    const found = exceptions.find(({ key }) => key === nameOf(query));
    if (found) return `No ${found.key} design exists, by the search of ${found.source.authors} (${found.source.year}).`;
    const bare = query.resolvable && unresolvable.find(({ key }) => key === nameOf(query));
    return bare ? `No ${bare.key} design is resolvable, by ${bare.source.authors} (${bare.source.year}).` : null;
  },
};

/** The paper that shows this one impossible, in place of the list's own source. */
export const sourceOfException = (name: string): Citation | undefined =>
  [...exceptions, ...unresolvable].find(({ key }) => key === name)?.source;
