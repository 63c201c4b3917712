import type { Grade } from '../evidence.ts';
import { logBinomialTail } from '../statistics/binomial-tail.ts';
import type { Entry, Known } from './entry.ts';
import type { CatalogueQuery } from './query.ts';

/** Whether one requirement is met, and how that is known. `unknown` where the formulas do not tell. */
export interface Verdict {
  requirement: string;
  outcome: 'meets' | 'misses' | 'unknown';
  grade: Grade;
  method: string;
}

type Test = (entry: Entry) => Verdict;
interface Window {
  min?: number;
  max?: number;
}

/** One test for each requirement that the query states. */
export function testsFor(query: CatalogueQuery): Test[] {
  const tests: Test[] = [];
  const add = (stated: unknown, test: Test) => {
    if (stated !== undefined) tests.push(test);
  };
  add(
    query.n,
    windowTest('length', query.n, ({ n }) => exact(n)),
  );
  add(query.k, windowTest('dimension', query.k, dimensionOf));
  add(
    query.rate,
    windowTest('rate', query.rate, (entry) => scaled(dimensionOf(entry), 1 / entry.n)),
  );
  add(
    query.columnWeight,
    windowTest('column weight', query.columnWeight, ({ columnWeight }) => exact(columnWeight)),
  );
  add(
    query.rowWeight,
    windowTest('row weight', query.rowWeight, ({ rowWeight }) => exact(rowWeight)),
  );
  add(
    query.girthMin,
    windowTest('girth', { min: query.girthMin }, ({ girth }) => girth),
  );
  add(
    query.distanceMin,
    windowTest('distance', { min: query.distanceMin }, ({ distance }) => distance),
  );
  add(query.radiusMin, windowTest('radius', { min: query.radiusMin }, radiusOf));
  add(query.structure, structureTest(query));
  add(query.resolvable, ({ resolvable }) => ({
    requirement: 'resolvable',
    outcome: resolvable === query.resolvable ? 'meets' : query.resolvable ? 'unknown' : 'misses',
    grade: 'proved',
    method: resolvable ? 'the construction gives parallel classes' : 'the construction gives none',
  }));
  add(query.payloadBits, windowTest('payload', { min: query.payloadBits }, dimensionOf));
  add(
    query.parityBits,
    windowTest('parity', { min: query.parityBits, max: query.parityBits }, ({ rank }) => rank),
  );
  if (query.p !== undefined && query.targetFer !== undefined) tests.push(frameErrorTest(query.p, query.targetFer));
  return tests;
}

const exact = (value: number): Known => ({ lower: value, upper: value, grade: 'proved', method: 'closed formula' });
const scaled = (known: Known, by: number): Known => ({ ...known, lower: known.lower * by, upper: known.upper * by });
const dimensionOf = ({ n, rank }: Entry): Known => ({ ...rank, lower: n - rank.upper, upper: n - rank.lower });
const radiusOf = ({ radius, radiusGrade }: Entry): Known => ({
  ...exact(radius),
  grade: radiusGrade,
  method: 'orthogonal checks',
});

/** Met when the whole enclosure lies in the window, missed when none of it does. */
function windowTest(
  requirement: string,
  { min = -Infinity, max = Infinity }: Window = {},
  value: (entry: Entry) => Known,
): Test {
  return (entry) => {
    const { lower, upper, grade, method } = value(entry);
    const outcome = lower >= min && upper <= max ? 'meets' : upper < min || lower > max ? 'misses' : 'unknown';
    return { requirement, outcome, grade, method };
  };
}

/** A cyclic code is quasi-cyclic as well. */
function structureTest({ structure }: CatalogueQuery): Test {
  return (entry) => {
    const meets = entry.structure === structure || (structure === 'quasi-cyclic' && entry.structure === 'cyclic');
    return {
      requirement: 'structure',
      outcome: meets ? 'meets' : 'misses',
      grade: 'proved',
      method: 'order of the construction',
    };
  };
}

/** One-step majority logic corrects every pattern within its radius, so its frame error rate is at most the chance of
 *  more errors than that; when that already passes, so does the code. Otherwise only a run can tell. */
function frameErrorTest(p: number, targetFer: number): Test {
  const logTarget = Math.log(targetFer);
  const known = new Map<number, boolean>();
  return ({ n, radius }) => {
    const key = n * 65_536 + radius;
    const meets = known.get(key) ?? logBinomialTail(n, p, radius) <= logTarget;
    known.set(key, meets);
    const method = 'chance of more errors than one step of majority logic always corrects';
    return { requirement: 'frame error rate', outcome: meets ? 'meets' : 'unknown', grade: 'proved', method };
  };
}
