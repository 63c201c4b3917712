import { smallestStoppingSets } from '../analysis/sets/stopping-sets.ts';
import { tannerOrbits } from '../analysis/tanner-orbits.ts';
import { knownSymmetry } from '../known-symmetry.ts';
import { enclosureLine } from '../properties.ts';
import type { CodeQuestion } from './question.ts';
import { setList } from './set-list.ts';

const BRANCHES_A_SECOND = 5e6;

/** The smallest sets of bits that the erasure channel can take and peeling not give back. */
export const stoppingSets: CodeQuestion = {
  answer(code, { seconds, onProgress }) {
    const { H } = code;
    const orbits = tannerOrbits(H, knownSymmetry(code));
    const budget = { nodes: seconds * BRANCHES_A_SECOND, keep: 1000, seed: 'stopping', orbits, onProgress };
    const { size, sets, count } = smallestStoppingSets(H, budget);
    const counted =
      count === undefined
        ? []
        : [
            {
              ...enclosureLine('stopping-count', 'Smallest stopping sets', {
                ...size,
                value: { lower: count, upper: count },
              }),
            },
          ];
    return {
      lines: [enclosureLine('stopping-size', 'Smallest stopping set', size), ...counted],
      ...(sets.length > 0 && { list: setList('stopping-sets.csv', sets) }),
    };
  },
};
