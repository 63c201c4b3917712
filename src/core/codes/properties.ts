import type { CodePrediction, DesignPrediction } from '../designs/family.ts';
import type { Citation } from '../errors.ts';
import type { Enclosure, Grade, Graded } from '../evidence.ts';
import type { LdpcAnalysis } from './analyse-ldpc.ts';
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
export function propertiesOf(
  code: LdpcCode,
  analysis: LdpcAnalysis,
  prediction: DesignPrediction,
  elapsedMs: number,
): Property[] {
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
    { ...fromGraded('k', 'Dimension k', evidence.k, spaced), elapsedMs },
    fromGraded('rank', 'Rank over GF(2)', evidence.rank, spaced),
    { ...counted('rate', 'Rate k/n', analysis.rate, 'k divided by n'), text: analysis.rate.toFixed(4) },
    counted('checks', 'Parity checks', H.rows, 'rows counted'),
    counted('ones', 'Ones in the matrix', H.colIndex.length, 'counted'),
    weights('row-weight', 'Row weight', analysis.rowWeights),
    weights('column-weight', 'Column weight', analysis.columnWeights),
    fromGraded('girth', 'Girth', evidence.girth, girthText),
    ...cycleLines(analysis),
    enclosureLine('distance', 'Minimum distance', analysis.distance),
    radiusLine(analysis),
    structureLine(analysis),
  ];
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
  const { value, grade, method, source } = graded;
  return {
    key,
    label,
    text: text(value),
    number: Number.isFinite(value) ? value : undefined,
    grade,
    method,
    source: cite(source),
  };
}

export function enclosureLine(
  key: string,
  label: string,
  { value, grade, method, source }: Graded<Enclosure>,
): Property {
  const { lower, upper } = value;
  const text = lower === upper ? (lower === 0 ? 'none' : spaced(lower)) : `${spaced(lower)} to ${spaced(upper)}`;
  return { key, label, text, number: lower, grade, method, source: cite(source) };
}

function weights(key: string, label: string, profile: readonly [number, number][]): Property {
  const text =
    profile.length === 1 ? spaced(profile[0]![0]) : `${spaced(profile[0]![0])} to ${spaced(profile.at(-1)![0])}`;
  return { key, label, text, number: profile[0]![0], grade: 'computed', method: 'counted' };
}

function cycleLines({ cycles, evidence }: LdpcAnalysis): Property[] {
  if (!cycles || !evidence.cycles) return [];
  const { grade, method } = evidence.cycles;
  return Object.entries(cycles).map(([length, count]) => ({
    key: `cycles-${length}`,
    label: `Cycles of length ${length}`,
    text: spaced(count),
    number: Number(count),
    grade,
    method,
  }));
}

/** With girth 6 or more the checks on a bit share no other bit, so they are orthogonal on it, and one step of majority
 *  logic corrects half as many errors as the least column weight, rounded down (Massey 1963). */
function radiusLine({ girth, columnWeights }: LdpcAnalysis): Property {
  const least = columnWeights[0]?.[0] ?? 0;
  const orthogonal = girth >= 6;
  const radius = Math.floor(least / 2);
  return {
    key: 'one-step-radius',
    label: 'One-step radius',
    text: orthogonal ? `${radius} ${radius === 1 ? 'error' : 'errors'}` : 'not known',
    number: orthogonal ? radius : undefined,
    grade: orthogonal ? 'proved' : 'bounded',
    method: orthogonal ? `${least} orthogonal checks on every bit` : 'checks on a bit share other bits, so 0 at least',
    source: orthogonal ? 'J. L. Massey, Threshold Decoding, 1963' : undefined,
  };
}

function structureLine({ cyclic, evidence }: LdpcAnalysis): Property {
  return {
    key: 'structure',
    label: 'Structure',
    text: cyclic ? 'cyclic' : 'not cyclic in this order',
    grade: evidence.cyclic.grade,
    method: evidence.cyclic.method,
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
