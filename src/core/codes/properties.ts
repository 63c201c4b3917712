import type { CodePrediction, DesignPrediction } from '../designs/family.ts';
import type { Citation } from '../errors.ts';
import type { Enclosure, Grade, Graded } from '../evidence.ts';
import type { LdpcAnalysis } from './analyse-ldpc.ts';
import { cycleHistogram } from './analysis/cycle-histogram.ts';
import type { LdpcCode } from './ldpc.ts';

/** One line of a code's sheet, ready to show. */
export interface Property {
  key: string;
  label: string;
  text: string;
  /** The value as a number, where it is one, for sorting and checks. */
  number?: number;
  grade: Grade;
  method: string;
  source?: string;
  elapsedMs?: number;
}

/** The lines of a code's sheet in the order shown. What a theorem says is shown as proved only where the matrix, as it was
 *  computed, agrees with it.
 *  @throws Error when a closed formula and the computed value differ: a fault of this program, never shown as a fact. */
export function propertiesOf(code: LdpcCode, analysis: LdpcAnalysis, prediction: DesignPrediction): Property[] {
  const { H } = code;
  const { evidence } = analysis;
  const predicted =
    code.transforms.length === 0 ? prediction.codes.find(({ checks }) => checks === code.checks) : undefined;
  refuseDisagreement(analysis, predicted);
  const counted = (key: string, label: string, value: number, method: string): Property => ({
    key,
    label,
    text: spaced(value),
    number: value,
    grade: 'computed',
    method,
  });
  return [
    counted('n', 'Length n', analysis.n, 'columns counted'),
    fromGraded('k', 'Dimension k', evidence.k, spaced),
    fromGraded('rank', 'Rank over GF(2)', evidence.rank, spaced),
    { ...counted('rate', 'Rate k/n', analysis.rate, 'k divided by n'), text: analysis.rate.toFixed(4) },
    counted('checks', 'Parity checks', H.rows, 'rows counted'),
    counted('ones', 'Ones in the matrix', H.colIndex.length, 'counted'),
    weights('row-weight', 'Row weight', analysis.rowWeights),
    weights('column-weight', 'Column weight', analysis.columnWeights),
    fromGraded('girth', 'Girth', evidence.girth, girthText),
    ...cycleLines(analysis),
    ...cyclesPerBitLine(analysis),
    enclosureLine('distance', 'Minimum distance', within(analysis.distance, predicted?.distance)),
    ...weightFourLine(analysis),
    fromGraded('one-step-radius', 'One-step radius', analysis.oneStepRadius, errorsText),
    ...multiStepLine(analysis),
    structureLine(analysis),
  ];
}

/** The narrower of what was found on the matrix and what a formula says of the design. */
function within(found: Graded<Enclosure>, predicted: Graded<Enclosure> | undefined): Graded<Enclosure> {
  if (!predicted) return found;
  const [a, b] = [found.value, predicted.value];
  const value = { lower: Math.max(a.lower, b.lower), upper: Math.min(a.upper, b.upper) };
  if (value.lower > value.upper)
    throw new Error(
      `a closed formula disagrees with the distance: ${b.lower} to ${b.upper}, found ${a.lower} to ${a.upper}`,
    );
  if (value.lower === a.lower && value.upper === a.upper) return found;
  if (value.lower === b.lower && value.upper === b.upper) return predicted;
  const grade = value.lower === value.upper ? 'proved' : 'bounded';
  const method = `${found.method}; by formula: ${predicted.method}`;
  return { value, grade, method, source: predicted.source, elapsedMs: found.elapsedMs };
}

function refuseDisagreement(analysis: LdpcAnalysis, predicted: CodePrediction | undefined): void {
  if (!predicted) return;
  const outside = (value: number, { value: { lower, upper } }: Graded<Enclosure>) => value < lower || value > upper;
  if (analysis.n !== predicted.n || outside(analysis.rank, predicted.rank) || outside(analysis.girth, predicted.girth))
    throw new Error(
      `a closed formula disagrees with the matrix: n ${predicted.n} and ${analysis.n}, rank and ${analysis.rank}, girth and ${analysis.girth}`,
    );
}

export function fromGraded(
  key: string,
  label: string,
  graded: Graded<number>,
  text: (value: number) => string,
): Property {
  const { value, grade, method, source, elapsedMs } = graded;
  return {
    key,
    label,
    text: text(value),
    number: Number.isFinite(value) ? value : undefined,
    grade,
    method,
    source: cite(source),
    ...(elapsedMs !== undefined && { elapsedMs }),
  };
}

export function enclosureLine(
  key: string,
  label: string,
  { value, grade, method, source, elapsedMs }: Graded<Enclosure>,
): Property {
  const { lower, upper } = value;
  const text = lower === upper ? (lower === 0 ? 'none' : spaced(lower)) : `${spaced(lower)} to ${spaced(upper)}`;
  const time = elapsedMs !== undefined && { elapsedMs };
  return { key, label, text, number: lower, grade, method, source: cite(source), ...time };
}

function weights(key: string, label: string, profile: readonly [number, number][]): Property {
  const text =
    profile.length === 1 ? spaced(profile[0]![0]) : `${spaced(profile[0]![0])} to ${spaced(profile.at(-1)![0])}`;
  return { key, label, text, number: profile[0]![0], grade: 'computed', method: 'counted' };
}

function cycleLines({ cycles, evidence }: LdpcAnalysis): Property[] {
  if (!cycles || !evidence.cycles) return [];
  const { grade, method, elapsedMs } = evidence.cycles;
  // All lengths were counted together, in the time told of the first.
  return Object.entries(cycles).map(([length, count], at) => ({
    key: `cycles-${length}`,
    label: `Cycles of length ${length}`,
    text: spaced(count),
    number: Number(count),
    grade,
    method,
    ...(at === 0 && elapsedMs !== undefined && { elapsedMs }),
  }));
}

/** How many of the shortest cycles pass through a bit, from the bit with fewest to the bit with most. */
function cyclesPerBitLine({ girth, cyclesPerColumn, evidence }: LdpcAnalysis): Property[] {
  const histogram = cycleHistogram(cyclesPerColumn, girth);
  if (!histogram || !evidence.cycles) return [];
  const [least, most] = [histogram[0]![0], histogram.at(-1)![0]];
  const text = least === most ? `${spaced(least)} through every bit` : `${spaced(least)} to ${spaced(most)}`;
  const { grade, method } = evidence.cycles;
  return [
    { key: 'cycles-per-bit', label: `Cycles of length ${girth} through a bit`, text, number: most, grade, method },
  ];
}

const errorsText = (radius: number) => `${radius} ${radius === 1 ? 'error' : 'errors'}`;

function multiStepLine({ majority }: LdpcAnalysis): Property[] {
  if (!majority || majority.value.steps.length < 2) return [];
  const { steps, radius } = majority.value;
  const line = fromGraded('multi-step-radius', 'Majority-logic radius', { ...majority, value: radius }, errorsText);
  return [{ ...line, text: `${errorsText(radius)} in ${steps.length} steps` }];
}

function weightFourLine({ weightFourWords }: LdpcAnalysis): Property[] {
  return weightFourWords ? [fromGraded('weight-4-words', 'Words of weight 4', weightFourWords, spaced)] : [];
}

function structureLine({ cyclic, quasiCyclic, evidence }: LdpcAnalysis): Property {
  const blocks = quasiCyclic && `quasi-cyclic, ${quasiCyclic.blocks} blocks of ${quasiCyclic.size} columns`;
  return {
    key: 'structure',
    label: 'Structure',
    text: cyclic ? 'cyclic' : (blocks ?? 'not cyclic in this order'),
    grade: evidence.cyclic.grade,
    method: evidence.cyclic.method,
    ...(evidence.cyclic.elapsedMs !== undefined && { elapsedMs: evidence.cyclic.elapsedMs }),
  };
}

const girthText = (value: number) => (Number.isFinite(value) ? String(value) : 'no cycles');

/** Thin spaces between groups of three digits, from five digits on. */
export function spaced(value: number | bigint): string {
  const digits = String(value);
  return digits.length < 5 || !/^\d+$/.test(digits) ? digits : digits.replace(/\B(?=(\d{3})+$)/g, '\u2009');
}

export function cite(source: Citation | undefined): string | undefined {
  if (!source) return undefined;
  return [`${source.authors} ${source.year}`, source.title, source.where, source.part].filter(Boolean).join(', ');
}
