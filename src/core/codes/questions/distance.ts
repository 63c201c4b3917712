import { analyseLdpc } from '../analyse-ldpc.ts';
import { knownSymmetry } from '../known-symmetry.ts';
import { enclosureLine } from '../properties.ts';
import type { CodeQuestion } from './question.ts';

/** Operations on words of 32 bits that a usual machine does in a second. */
const OPERATIONS_A_SECOND = 2e8;

/** The minimum distance, between what is proved and the lightest word found. */
export const distance: CodeQuestion = {
  answer(code, { seconds, onProgress }) {
    const effort = { wordOperations: seconds * OPERATIONS_A_SECOND };
    const known = { ...code, columnSymmetry: knownSymmetry(code) };
    const found = analyseLdpc(known, { cycles: false, distance: effort, onProgress }).distance;
    return { lines: [enclosureLine('distance', 'Minimum distance', found)] };
  },
};
