import { absorbingSets as search } from '../analysis/sets/absorbing-sets.ts';
import { tannerOrbits } from '../analysis/tanner-orbits.ts';
import { knownSymmetry } from '../known-symmetry.ts';
import type { CodeQuestion } from './question.ts';
import { setList } from './set-list.ts';

const BRANCHES_A_SECOND = 2e6;
const LARGEST = 12;
const KEPT = 500;

/** Small sets of bits that bit flipping does not leave: a bits, b checks that meet them an odd number of times. */
export const absorbingSets: CodeQuestion = {
  answer(code, { seconds, onProgress }) {
    const { H } = code;
    const { classes, completeTo } = search(H, {
      orbits: tannerOrbits(H, knownSymmetry(code)).columns,
      largest: LARGEST,
      nodes: seconds * BRANCHES_A_SECOND,
      keep: KEPT,
      onProgress,
    });
    const { value, grade, method, source } = completeTo;
    const cited = source && `${source.authors} ${source.year}, ${source.title}`;
    const lines = classes.map(({ a, b, count, fullyAbsorbing }) => {
      const whole = a <= value;
      return {
        key: `absorbing-${a}-${b}`,
        label: `(${a}, ${b}) absorbing sets`,
        text: whole ? `${count}, ${fullyAbsorbing} of them fully` : `${count} met, others may be`,
        number: count,
        grade: whole ? grade : ('bounded' as const),
        method,
        source: cited,
      };
    });
    const listed = classes.flatMap(({ a, b, sets }) => sets.map((set) => ({ head: `(${a} ${b})`, set })));
    return {
      lines: [
        {
          key: 'absorbing-complete',
          label: 'Absorbing sets listed',
          text: `all of up to ${value} bits`,
          number: value,
          // Of larger ones nothing is said.
          grade: 'bounded' as const,
          method,
          source: cited,
        },
        ...lines,
      ],
      ...(listed.length > 0 && {
        list: setList(
          'absorbing-sets.csv',
          listed.map(({ set }) => set),
          listed.map(({ head }) => head),
        ),
      }),
    };
  },
};
