import { type SparseMatrix, transpose } from '../codes/sparse-matrix.ts';
import type { Enclosure, Graded } from '../evidence.ts';
import type { BlockDesign, DesignSpec } from './block-design.ts';
import { certify, type TimedCertificate } from './certify.ts';
import { buildDesign, predictDesign } from './design.ts';
import type { DesignPrediction } from './family.ts';
import { isResolution } from './resolve.ts';
import { certifyUpload } from './upload.ts';

/** Where a design's blocks come from: built anew from a spec, or read off a matrix that a file held. */
export type DesignSource =
  | { kind: 'spec'; spec: DesignSpec }
  | { kind: 'matrix'; H: SparseMatrix; blocksAre: 'rows' | 'columns' };

export type OpenStep = 'build' | 'verify';

/** A design whose blocks are at hand and were held against its claim. */
export interface OpenedDesign {
  design: BlockDesign;
  /** Every t-subset lies in lambda blocks; t = 0 when not even the points lie on equally many. */
  claim: { t: number; lambda: number; partialLinear: boolean };
  certificate: TimedCertificate;
  /** The construction's own classes were checked: they partition the blocks, and each the points. */
  isResolved: boolean;
  /** 2-rank by the family's formulas, where they say something. */
  predictedRank?: Graded<Enclosure>;
}

/** Builds or reads the blocks, then proves from them what is claimed. `clock` gives milliseconds.
 *  @throws ParamError, InfeasibleError or LimitError as the family does. */
export function openDesign(
  source: DesignSource,
  { clock, onStep }: { clock(): number; onStep?(step: OpenStep): void },
): OpenedDesign {
  onStep?.('build');
  if (source.kind === 'matrix') {
    const design = designFromMatrix(source.blocksAre === 'rows' ? source.H : transpose(source.H));
    onStep?.('verify');
    const from = clock();
    const { t, lambda, certificate } = certifyUpload(design);
    return {
      design,
      claim: { t, lambda, partialLinear: false },
      certificate: { ...certificate, elapsedMs: clock() - from },
      isResolved: false,
    };
  }
  const prediction = predictDesign(source.spec);
  const design = buildDesign(source.spec);
  onStep?.('verify');
  const certificate = certify(design, prediction, clock);
  const predictedRank = rankByFormula(prediction);
  return {
    design,
    claim: { t: prediction.t, lambda: prediction.lambda, partialLinear: prediction.partialLinear ?? false },
    certificate,
    isResolved: design.classes !== undefined && isResolution(design, design.classes),
    ...(predictedRank && { predictedRank }),
  };
}

/** A matrix and its transpose have one rank, so any orientation will do. */
const rankByFormula = ({ codes }: DesignPrediction) => codes[0]?.rank;

/** Rows as blocks, columns as points. */
export const designFromMatrix = ({ rows, cols, rowStart, colIndex }: SparseMatrix): BlockDesign => ({
  v: cols,
  b: rows,
  blockStart: rowStart,
  blockPoints: colIndex,
});

/** Blocks as rows, points as columns: the incidence matrix. */
export const incidenceMatrix = ({ v, b, blockStart, blockPoints }: BlockDesign): SparseMatrix => ({
  rows: b,
  cols: v,
  rowStart: blockStart,
  colIndex: blockPoints,
});
