import type { DesignSpec } from '../designs/block-design.ts';
import { certify, type TimedCertificate } from '../designs/certify.ts';
import { buildDesign, predictDesign } from '../designs/design.ts';
import { designTitle } from '../designs/design-title.ts';
import type { DesignPrediction } from '../designs/family.ts';
import { ParamError } from '../errors.ts';
import { analyseLdpc } from './analyse-ldpc.ts';
import { columnWeightProfile, rowWeightProfile } from './analysis/weights.ts';
import { type ConstantWeightCode, deriveConstantWeight, wordMatrix } from './constant-weight/constant-weight-code.ts';
import { constantWeightSheet } from './constant-weight/constant-weight-sheet.ts';
import { laps } from './laps.ts';
import { deriveLdpc, type LdpcCode, type Transform } from './ldpc.ts';
import { type Property, propertiesOf } from './properties.ts';
import type { SparseMatrix } from './sparse-matrix.ts';

/** What to build: a design, and how its code comes from it. */
export interface SheetRequest {
  design: DesignSpec;
  derivation: LdpcDerivation | ConstantWeightDerivation;
}

export interface LdpcDerivation {
  kind: 'ldpc';
  checks: 'blocks' | 'points';
  transforms?: Transform[];
}

export interface ConstantWeightDerivation {
  kind: 'constant-weight';
  /** Ones and zeros of the blocks exchanged. */
  complement?: boolean;
}

export type SheetStep = 'build' | 'verify' | 'derive' | 'analyse';

/** A code with all that is known of it, ready to be kept and shown. */
export interface CodeSheet {
  /** Parity checks as rows; of a constant-weight code, its words. */
  H: SparseMatrix;
  n: number;
  /** Dimension; of a constant-weight code, the bits that a word carries. */
  k: number;
  designTitle: string;
  certificate: TimedCertificate;
  properties: Property[];
  /** Pairs of weight and how many rows (columns) have it, ascending. */
  rowWeights: [number, number][];
  columnWeights: [number, number][];
}

/** Builds the design, proves it, derives the matrix and analyses it: the one road from a spec to a code.
 *  `clock` gives milliseconds, since the engine itself reads no clock.
 *  @throws ParamError, InfeasibleError or LimitError as the family does; ParamError when the design's blocks do not
 *  hold up its claim, which would be a fault of this program. */
export function codeSheet(
  request: SheetRequest,
  options: { clock(): number; onStep?(step: SheetStep): void },
): CodeSheet {
  const { clock, onStep } = options;
  const { derivation } = request;
  if (derivation.kind !== 'ldpc' && derivation.kind !== 'constant-weight')
    throw new ParamError('derivation.kind', (derivation as { kind: unknown }).kind, '"ldpc" or "constant-weight"');
  const prediction = predictDesign(request.design);
  onStep?.('build');
  const design = buildDesign(request.design);
  onStep?.('verify');
  const certificate = certify(design, prediction, clock);
  if (!certificate.holds)
    throw new ParamError('design', request.design.family, `a design whose blocks verify (${certificate.reason})`);
  onStep?.('derive');
  const named = { designTitle: designTitle(request.design), certificate };
  if (derivation.kind === 'constant-weight') {
    const lap = laps(clock);
    const code = deriveConstantWeight(design, derivation);
    const distanceMs = lap();
    onStep?.('analyse');
    return { ...describeWords(code, clock, distanceMs), ...named };
  }
  const code = deriveLdpc(design, derivation);
  onStep?.('analyse');
  return { ...describeCode(code, prediction, clock), ...named };
}

/** The distance was computed when the words were derived. */
function describeWords(code: ConstantWeightCode, clock: () => number, elapsedMs: number | undefined) {
  const { n, messageBits: k, properties } = constantWeightSheet(code, { clock });
  const H = wordMatrix(code);
  const timed = properties.map((line) => (line.key === 'distance' ? { ...line, elapsedMs } : line));
  return { H, n, k, properties: timed, rowWeights: rowWeightProfile(H), columnWeights: columnWeightProfile(H) };
}

function describeCode(code: LdpcCode, prediction: DesignPrediction, clock: () => number) {
  const analysis = analyseLdpc(code, { cycles: true, clock });
  const properties = propertiesOf(code, analysis, prediction);
  const { H } = code;
  const { n, k, rowWeights, columnWeights } = analysis;
  return { H, n, k, properties, rowWeights, columnWeights };
}
