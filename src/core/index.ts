/** The one door to the engine. Names and shapes exported here are kept stable; a change of one is noted in CHANGELOG.md. */

export { awgnCapacity, binaryInputAwgn } from './bounds/awgn-capacity.ts';
export { type BchReference, bchReference } from './bounds/bch-reference.ts';
export { becConverse, becRandomCodingUnion } from './bounds/bec-bounds.ts';
export { becCapacity } from './bounds/bec-capacity.ts';
export { gilbertVarshamovBound, hammingBound, plotkinBound, singletonBound } from './bounds/block-code-bounds.ts';
export { bscCapacity, bscDispersion, bscShannonLimit } from './bounds/bsc-capacity.ts';
export { bscConverse } from './bounds/bsc-converse.ts';
export { bscRandomCodingUnion } from './bounds/bsc-random-coding.ts';
export { johnsonBound, johnsonPackingBound, refinedJohnsonBound } from './bounds/johnson-bound.ts';
export { normalApproximation } from './bounds/normal-approximation.ts';
export { schonheimBound } from './bounds/schonheim-bound.ts';
export { undetectedErrorRate, unionBound } from './bounds/union-bound.ts';
export { type Nearest, nearestAlternatives } from './catalogue/nearest.ts';
export { obstaclesTo } from './catalogue/obstacles.ts';
export { type CatalogueQuery, catalogueQuerySchema } from './catalogue/query.ts';
export type { Verdict } from './catalogue/requirements.ts';
export { type Candidate, type SearchResult, searchCatalogue, searchTable } from './catalogue/search.ts';
export { catalogueTable } from './catalogue/table.ts';
export { type Channel, channelSchema } from './channels/channel.ts';
export { type AnalysableCode, analyseLdpc, type LdpcAnalysis } from './codes/analyse-ldpc.ts';
export { cycleHistogram } from './codes/analysis/cycle-histogram.ts';
export { type DistanceEffort, distanceEfforts } from './codes/analysis/distance/distance.ts';
export { type DistanceFound, findDistance } from './codes/analysis/distance/exact-distance.ts';
export { lowerBounds } from './codes/analysis/distance/lower-bounds.ts';
export { weightDistribution } from './codes/analysis/distance/weight-distribution.ts';
export { weightFourWords } from './codes/analysis/distance/weight-four.ts';
export { type MajoritySteps, multiStepMajority, oneStepRadius } from './codes/analysis/majority-logic.ts';
export { type AbsorbingSets, absorbingSets } from './codes/analysis/sets/absorbing-sets.ts';
export { type StoppingSets, smallestStoppingSets } from './codes/analysis/sets/stopping-sets.ts';
export { type OverlapSpectrum, overlapSpectrum } from './codes/analysis/spectrum/second-eigenvalue.ts';
export { tannerOrbits } from './codes/analysis/tanner-orbits.ts';
export {
  type ConstantWeightCode,
  deriveConstantWeight,
  wordMatrix,
} from './codes/constant-weight/constant-weight-code.ts';
export {
  type ConstantWeightSheet,
  constantWeightSheet,
} from './codes/constant-weight/constant-weight-sheet.ts';
export { disjunctness } from './codes/constant-weight/disjunctness.ts';
export { coverEncoder, type EnumerativeEncoder, tableEncoder } from './codes/constant-weight/enumerative.ts';
export { type KnownSize, knownSize } from './codes/constant-weight/known-size.ts';
export {
  type OpticalOrthogonalCode,
  opticalOrthogonalCode,
  opticalOrthogonalFromDesign,
} from './codes/constant-weight/optical-orthogonal.ts';
export { complementCode, shortenAt } from './codes/constant-weight/smaller-codes.ts';
export { parallelClassesOf, partitionByClasses } from './codes/constant-weight/word-classes.ts';
export { threshold, thresholdOfMatrix } from './codes/density-evolution/threshold.ts';
export { approximateTriangularEncoder } from './codes/encode/approximate-triangular.ts';
export { type EncoderEntry, type EncoderReport, encoderReport } from './codes/encode/encoder-report.ts';
export { generatorPolynomial } from './codes/encode/generator-polynomial.ts';
export { shiftRegister } from './codes/encode/shift-register.ts';
export { systematicCirculants } from './codes/encode/systematic-circulants.ts';
export { type SystematicEncoder, systematicEncoder } from './codes/encode/systematic-encoder.ts';
export { fingerprint } from './codes/fingerprint.ts';
export { deriveLdpc, type LdpcCode, type Transform } from './codes/ldpc.ts';
export { type CodeSheet, codeSheet, type SheetRequest } from './codes/sheet.ts';
export { type SparseMatrix, syndrome } from './codes/sparse-matrix.ts';
export { type StoredRequest, storedSheet } from './codes/stored-sheet.ts';
export { exactFit, rankFits } from './codes/transforms/exact-fit.ts';
export { transformKinds } from './codes/transforms/registry.ts';
export { decoderCard, decoderCards, edgeVisitsPerBit } from './decoders/catalogue.ts';
export { createDecoder } from './decoders/create-decoder.ts';
export { type DecoderSpec, decoderSchema } from './decoders/decoder-spec.ts';
export { nearestWord } from './decoders/nearest-word.ts';
export type { BlockDesign, DesignSpec } from './designs/block-design.ts';
export { buildDesign, listFamilies, predictDesign } from './designs/design.ts';
export { designTitle } from './designs/design-title.ts';
export type { CodePrediction, DesignPrediction, ParamInfo } from './designs/family.ts';
export { type Feasibility, feasibility } from './designs/feasibility/feasibility.ts';
export { spreadBasis } from './designs/geometry/spread.ts';
export { findResolution, type ResolutionOptions, type ResolutionOutcome, searchResolution } from './designs/resolve.ts';
export { type DesignCertificate, verifyDesign } from './designs/verify.ts';
export { type Citation, FormatError, InfeasibleError, LimitError, ParamError } from './errors.ts';
export type { Enclosure, Grade, Graded } from './evidence.ts';
export { exportMatrix, importMatrix, matrixFormats } from './formats/index.ts';
export { readWordList, type WordList, writeWordListCsv, writeWordListText } from './formats/word-list.ts';
export { eliminationRank, rank } from './gf2/rank.ts';
export { type Calibration, calibrate } from './simulation/calibrate.ts';
export {
  computedStratum,
  type Enumeration,
  type EnumerationOptions,
  enumerateStratum,
} from './simulation/enumerate-stratum.ts';
export { guaranteedRadius } from './simulation/guaranteed-radius.ts';
export { type NearestWordSpec, runNearestWordShard, type WordTally } from './simulation/nearest-word-shard.ts';
export { createPatternSource, type PatternSource } from './simulation/patterns.ts';
export { framesLeft, framesToPlan, guessRate } from './simulation/planning.ts';
export type { RunSpec } from './simulation/run-spec.ts';
export { describeKernel, type Kernel, runShard, type ShardOptions } from './simulation/shard.ts';
export { countedShards, type StoppingRule, stoppingReason } from './simulation/stopping.ts';
export { runStratum } from './simulation/strata.ts';
export {
  provedStrata,
  type StratifiedRate,
  type Stratum,
  stratifiedCurve,
  stratifiedRate,
} from './simulation/stratified-rate.ts';
export { allocateShards, dominantStrata } from './simulation/stratum-planning.ts';
export { emptyTally, mergeTallies, type Tally, tallySchema } from './simulation/tally.ts';
export { berInterval } from './statistics/ber-interval.ts';
export { binomialInterval, zeroErrorUpperLimit } from './statistics/binomial-interval.ts';
export { compareRates, type RateComparison } from './statistics/compare-rates.ts';
export { summariseIterations } from './statistics/iteration-summary.ts';
export { errorsForPrecision, type StoppedRun, stoppedRate } from './statistics/stopped-run.ts';
