import type { Enclosure, Graded } from '../../evidence.ts';
import { predictTwoDesignCodes, type TwoDesignCounts } from '../code-prediction.ts';
import type { CodePrediction } from '../family.ts';
import { between, exactly } from '../partial-linear-prediction.ts';

export interface FlatCodeFacts {
  rank: Graded<Enclosure>;
  structure: Record<CodePrediction['checks'], CodePrediction['structure']>;
}

/** Both codes of a 2-design whose rank is known, with what voting among λ-fold checks gives. */
export function predictFlatCodes(counts: TwoDesignCounts, { rank, structure }: FlatCodeFacts): CodePrediction[] {
  const distance = distanceOfBlocksCode(counts, rank);
  return predictTwoDesignCodes(counts, {
    rank,
    distance: distance && { blocks: distance },
    orientations: ['blocks', 'points'],
  }).map((code) => ({
    ...code,
    structure: structure[code.checks],
    oneStepRadius: code.checks === 'blocks' ? voteRadius(counts) : code.oneStepRadius,
  }));
}

/** The distance when checks are blocks; undefined when the code holds only the zero word. A word's bit lies in r checks,
 *  each of which meets another bit of the word, and every other bit answers for at most λ of them: weight ≥ r/λ + 1. */
export function distanceOfBlocksCode(
  { v, k, r, lambda }: TwoDesignCounts,
  rank: Graded<Enclosure>,
): Graded<Enclosure> | undefined {
  const { lower, upper } = rank.value;
  if (lower >= v) return undefined;
  if (lower === v - 1 && upper === v - 1 && k % 2 === 0)
    return exactly(v, 'proved', 'the only word but zero is all-one');
  const least = Math.min(v, Math.ceil(r / lambda) + 1);
  return between(least, Math.max(least, Math.min(v, upper + 1)), 'r/λ + 1 by counting checks; Singleton above');
}

/** Errors that one vote among a bit's r checks corrects when two bits share λ of them: ⌊r/(2λ)⌋. */
function voteRadius({ r, lambda }: TwoDesignCounts): Graded<number> {
  const method =
    lambda === 1
      ? 'as many checks orthogonal on each bit as its column weight (Massey 1963)'
      : `each other error spoils at most ${lambda} of ${r} votes (Rudolph 1967)`;
  return { value: Math.floor(r / (2 * lambda)), grade: 'proved', method };
}
