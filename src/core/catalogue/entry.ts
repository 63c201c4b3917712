import type { DesignSpec } from '../designs/block-design.ts';
import type { CodePrediction, DesignPrediction } from '../designs/family.ts';
import type { Enclosure, Grade } from '../evidence.ts';

/** A closed-formula value with how it is known, cheap enough to hold by the ten thousand. */
export interface Known extends Enclosure {
  grade: Grade;
  method: string;
}

/** One code that could be built: a design, an orientation, and perhaps only some of its parallel classes. */
export interface Entry {
  design: DesignSpec;
  checks: 'blocks' | 'points';
  /** Parallel classes kept, when not all of them. */
  keptClasses?: number;
  n: number;
  rank: Known;
  girth: Known;
  distance: Known;
  radius: number;
  radiusGrade: Grade;
  columnWeight: number;
  rowWeight: number;
  structure: CodePrediction['structure'];
  resolvable: boolean;
}

export function entryOf(design: DesignSpec, prediction: DesignPrediction, code: CodePrediction): Entry {
  // Field by field: spreading takes several times as long, and the catalogue asks for tens of thousands.
  const known = ({ value: { lower, upper }, grade, method }: CodePrediction['rank']): Known => {
    return { lower, upper, grade, method };
  };
  return {
    design,
    checks: code.checks,
    n: code.n,
    rank: known(code.rank),
    girth: known(code.girth),
    distance: known(code.distance),
    radius: code.oneStepRadius.value,
    radiusGrade: code.oneStepRadius.grade,
    columnWeight: code.columnWeight,
    rowWeight: code.rowWeight,
    structure: code.structure,
    resolvable: prediction.resolvable ?? false,
  };
}
