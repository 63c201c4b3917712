import type { Grade } from '../evidence.ts';
import { logBinomialTerm } from '../statistics/binomial-term.ts';
import type { CatalogueColumns } from './columns.ts';
import type { Entry, Known } from './entry.ts';
import type { Fit } from './fit.ts';
import { leastRadii } from './frame-error-radius.ts';
import type { CatalogueQuery } from './query.ts';

/** Whether one requirement is met, and how that is known. `unknown` where the formulas do not tell. */
export interface Verdict {
  requirement: string;
  outcome: 'meets' | 'misses' | 'unknown';
  grade: Grade;
  method: string;
}

/** One thing asked of a code, decided from the columns; the words are for the rows that are shown. */
export interface Requirement {
  name: string;
  outcome(row: number): Verdict['outcome'];
  grounds(entry: Entry): { grade: Grade; method: string };
}

interface Window {
  min?: number;
  max?: number;
}
type Figure = (row: number) => number;

/** One for each requirement that the query states. */
export function requirementsOf(query: CatalogueQuery, columns: CatalogueColumns, fit: Fit): Requirement[] {
  const column = (name: Parameters<CatalogueColumns['column']>[0]): Figure => {
    const values = columns.column(name);
    return (row) => values[row]!;
  };
  const [n, rankLower, rankUpper] = [column('n'), column('rankLower'), column('rankUpper')];
  const asked = query.payloadBits !== undefined ? query.payloadBits : undefined;
  const after = (words: string) => (fit.isAsked ? `${words} after shortening` : words);
  const rate = (k: Figure, length: Figure) => (row: number) => k(row) / length(row);
  const lengths: [Figure, Figure] = [(row) => fit.shortestLength(row), (row) => fit.longestLength(row)];
  const dimensions: [Figure, Figure] = [(row) => fit.leastDimension(row), (row) => fit.mostDimension(row)];
  // A payload fixes k, so that the shortest length has the highest rate; a length alone leaves k to move.
  const rates: [Figure, Figure] = [rate(dimensions[0], lengths[1]), rate(dimensions[1], lengths[0])];
  const ofRank = (words: string) => (entry: Entry) => ({
    grade: entry.rank.grade,
    method: `${words}; rank: ${entry.rank.method}`,
  });
  const formula = () => ({ grade: 'proved' as const, method: 'closed formula' });
  const list: (Requirement | false | undefined)[] = [
    query.n && window('length', query.n, lengths, query.payloadBits === undefined ? formula : ofRank(after('n'))),
    query.k && window('dimension', query.k, dimensions, ofRank(after('n − rank'))),
    query.rate && window('rate', query.rate, rates, ofRank(after('k / n'))),
    query.columnWeight && window('column weight', query.columnWeight, twice(column('columnWeight')), formula),
    query.rowWeight &&
      window('row weight', query.rowWeight, rowWeights(column('rowWeight'), fit), () => ({
        grade: 'proved',
        method: fit.isAsked ? 'at most this; rows lose the bits that are dropped' : 'closed formula',
      })),
    query.girthMin !== undefined &&
      window('girth', { min: query.girthMin }, girths(columns, fit), ({ girth }) => girth),
    query.distanceMin !== undefined &&
      window('distance', { min: query.distanceMin }, distances(columns, fit), ({ distance }) => distance),
    query.radiusMin !== undefined &&
      window('radius', { min: query.radiusMin }, twice(column('radius')), ({ radiusGrade }) => ({
        grade: radiusGrade,
        method: 'orthogonal checks, corrected by one step of majority logic',
      })),
    query.structure && structureRequirement(query.structure, columns),
    query.resolvable !== undefined && resolvableRequirement(query.resolvable, columns),
    asked !== undefined &&
      window(
        'payload',
        { min: asked },
        [(row) => n(row) - rankUpper(row), (row) => n(row) - rankLower(row)],
        ofRank('n − rank before shortening'),
      ),
    fit.lengthAsked !== undefined && exactLength(fit.lengthAsked, columns),
    ...parityRequirements(query, [rankLower, rankUpper], ofRank('n − k')),
    query.p !== undefined &&
      query.targetFer !== undefined &&
      frameErrorRequirement(query.p, query.targetFer, columns, fit),
  ];
  return list.filter((each) => !!each);
}

/** Met when the whole enclosure lies in the window, missed when none of it does. */
function window(
  name: string,
  { min = Number.NEGATIVE_INFINITY, max = Number.POSITIVE_INFINITY }: Window,
  [lower, upper]: readonly [Figure, Figure],
  grounds: (entry: Entry) => Pick<Known, 'grade' | 'method'>,
): Requirement {
  const outcome = (row: number) => {
    const [least, most] = [lower(row), upper(row)];
    if (most < min || least > max) return 'misses';
    return least >= min && most <= max ? 'meets' : 'unknown';
  };
  return { name, outcome, grounds: (entry) => ({ grade: grounds(entry).grade, method: grounds(entry).method }) };
}

const twice = (figure: Figure): [Figure, Figure] => [figure, figure];

/** Rows lose what is dropped: the weight before is only a ceiling then. */
const rowWeights = (weight: Figure, fit: Fit): [Figure, Figure] => [
  (row) => (fit.shortening(row).upper > 0 ? Math.max(0, weight(row) - fit.shortening(row).upper) : weight(row)),
  weight,
];

/** Dropping columns only breaks cycles. A 4-cycle stays as long as the columns left hold more pairs of rows than there are. */
function girths(columns: CatalogueColumns, fit: Fit): [Figure, Figure] {
  const [lower, upper] = [columns.column('girthLower'), columns.column('girthUpper')];
  const [n, columnWeight, rowWeight] = [
    columns.column('n'),
    columns.column('columnWeight'),
    columns.column('rowWeight'),
  ];
  const after = (row: number) => {
    if (fit.shortening(row).upper === 0) return upper[row]!;
    if (upper[row]! > 4) return Number.POSITIVE_INFINITY;
    const rows = (n[row]! * columnWeight[row]!) / rowWeight[row]!;
    const pairs = fit.shortestLength(row) * columnWeight[row]! * (columnWeight[row]! - 1);
    return pairs > rows * (rows - 1) ? 4 : Number.POSITIVE_INFINITY;
  };
  return [(row) => lower[row]!, after];
}

/** Shortening keeps a distance or raises it, to n − k + 1 at most (Singleton). */
function distances(columns: CatalogueColumns, fit: Fit): [Figure, Figure] {
  const [lower, upper] = [columns.column('distanceLower'), columns.column('distanceUpper')];
  const rank = columns.column('rankUpper');
  return [(row) => lower[row]!, (row) => (fit.shortening(row).upper === 0 ? upper[row]! : rank[row]! + 1)];
}

/** A cyclic code is quasi-cyclic as well. A shortened code keeps the encoder of the one it came from. */
function structureRequirement(structure: 'cyclic' | 'quasi-cyclic', columns: CatalogueColumns): Requirement {
  const level = structure === 'cyclic' ? 2 : 1;
  const values = columns.column('structure');
  return {
    name: 'structure',
    outcome: (row) => (values[row]! >= level ? 'meets' : 'misses'),
    grounds: () => ({ grade: 'proved', method: 'order of the construction, before any shortening' }),
  };
}

function resolvableRequirement(wanted: boolean, columns: CatalogueColumns): Requirement {
  const values = columns.column('resolvable');
  return {
    name: 'resolvable',
    outcome: (row) => ((values[row] === 1) === wanted ? 'meets' : wanted ? 'unknown' : 'misses'),
    grounds: ({ resolvable }) => ({
      grade: 'proved',
      method: resolvable ? 'the construction gives parallel classes' : 'the construction gives none',
    }),
  };
}

/** The code must be long enough, and have an information bit left when it is cut to the length. */
function exactLength(length: number, columns: CatalogueColumns): Requirement {
  const [n, lower, upper] = [columns.column('n'), columns.column('rankLower'), columns.column('rankUpper')];
  return {
    name: 'length to shorten to',
    outcome: (row) => {
      if (n[row]! < length || length <= lower[row]!) return 'misses';
      return length > upper[row]! ? 'meets' : 'unknown';
    },
    grounds: ({ rank }) => ({ grade: rank.grade, method: `information bits to drop; rank: ${rank.method}` }),
  };
}

/** Parity asked for in so many words, and the parity that a payload and a length leave between them. */
function parityRequirements(
  { parityBits, payloadBits, shortenTo }: CatalogueQuery,
  rank: [Figure, Figure],
  grounds: Requirement['grounds'],
): Requirement[] {
  const exactly = (name: string, bits: number) => window(name, { min: bits, max: bits }, rank, grounds);
  return [
    ...(parityBits === undefined ? [] : [exactly('parity', parityBits)]),
    ...(payloadBits === undefined || shortenTo === undefined
      ? []
      : [exactly('parity between payload and length', shortenTo - payloadBits)]),
  ];
}

/** One step of majority logic corrects every pattern within the radius, so its frame error rate is at most the chance of
 *  more errors than that; when that already passes, so does the code. No decoder of a linear code corrects more than
 *  2^(n−k) patterns, one a coset; when those of one weight below the least radius are more than that already, no decoder
 *  passes. Between the two only a run can tell. */
function frameErrorRequirement(p: number, target: number, columns: CatalogueColumns, fit: Fit): Requirement {
  const n = columns.column('n');
  const radii = leastRadii(
    p,
    target,
    n.reduce((most, each) => Math.max(most, each), 1),
  );
  const [radius, rankUpper] = [columns.column('radius'), columns.column('rankUpper')];
  const logPatterns = new Float64Array(radii.length).fill(Number.NaN);
  const patterns = (length: number) => {
    if (Number.isNaN(logPatterns[length]!)) logPatterns[length] = logLastShell(length, radii[length]! - 1);
    return logPatterns[length]!;
  };
  const outcome = (row: number): Verdict['outcome'] => {
    if (fit.longestLength(row) < radii.length && radius[row]! >= radii[fit.longestLength(row)]!) return 'meets';
    const shortest = Math.min(fit.shortestLength(row), radii.length - 1);
    return patterns(shortest) > rankUpper[row]! + 1e-6 ? 'misses' : 'unknown';
  };
  const method =
    'met where the chance of more errors than one step of majority logic always corrects is small enough; missed where the likely patterns outnumber the syndromes; else a run must tell';
  return { name: 'frame error rate', outcome, grounds: () => ({ grade: 'proved', method }) };
}

/** log2 of the number of patterns of w errors; below everything where w is none or more than half. */
function logLastShell(n: number, w: number): number {
  return w < 0 || 2 * w > n ? Number.NEGATIVE_INFINITY : n + logBinomialTerm(n, w, 0.5) * Math.LOG2E;
}
