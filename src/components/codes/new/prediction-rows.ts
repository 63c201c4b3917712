import { counted, scientific, wholeNumber } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import type { CodePrediction, DesignPrediction } from '@/core/designs/family.ts';
import type { Enclosure, Graded } from '@/core/evidence.ts';
import { shortCitation } from '../citation-text.ts';
import { enclosureText } from '../enclosure-text.ts';

/** The design's own parameters, by formula. */
export function designRows(title: string, p: DesignPrediction): TitleRow[] {
  return [
    { label: 'Design', value: title },
    { label: 'Points, blocks', value: `${wholeNumber(p.v)}, ${wholeNumber(p.b)}` },
    { label: 'Block size', value: wholeNumber(p.k) },
    { label: 'Blocks a point', value: wholeNumber(p.r) },
    p.partialLinear
      ? { label: 'Two points', value: 'on one block at most' }
      : { label: `Each ${p.t === 1 ? 'point' : `${p.t} points`}`, value: `in ${wholeNumber(p.lambda)} of the blocks` },
  ];
}

/** What formulas say of the code, each with how it is known. */
export function codeRows(design: DesignPrediction, checks: 'blocks' | 'points'): TitleRow[] {
  const n = checks === 'blocks' ? design.v : design.b;
  const byFormula = `the ${checks === 'blocks' ? 'points' : 'blocks'} of the design`;
  const length: TitleRow = { label: 'Length n', value: wholeNumber(n), grade: 'proved', note: byFormula };
  const code = design.codes.find((candidate) => candidate.checks === checks);
  if (!code) return [length, { label: 'Dimension k', value: 'no formula; the build computes it' }];
  return [
    length,
    graded('Dimension k', code.k),
    rateRow(code),
    graded('Girth', code.girth, (e) => (e.lower === Number.POSITIVE_INFINITY ? 'no cycle' : enclosureText(e))),
    graded('Distance', code.distance, (e) => (code.k.value.upper === 0 ? 'only the zero word' : enclosureText(e))),
    radiusRow(code),
    { label: 'Row weight', value: wholeNumber(code.rowWeight), grade: 'proved' },
    { label: 'Column weight', value: wholeNumber(code.columnWeight), grade: 'proved' },
    { label: 'Structure', value: code.structure === 'none' ? 'none claimed' : code.structure, grade: 'proved' },
  ];
}

/** What is known of the constant-weight code of the blocks before it is built. */
export function wordRows(
  { v, b, k, t, lambda, partialLinear }: DesignPrediction,
  words: 'blocks' | 'complements',
): TitleRow[] {
  const w = words === 'blocks' ? k : v - k;
  // Two blocks that share t points would cover a t-subset twice.
  const shared = partialLinear ? 2 : t;
  const distance: TitleRow =
    partialLinear || lambda === 1
      ? {
          label: 'Distance',
          value: `≥ ${wholeNumber(2 * (k - shared + 1))}`,
          grade: 'proved',
          note: `no two blocks share ${counted(shared, 'point')}; the build computes it`,
        }
      : { label: 'Distance', value: 'the build computes it' };
  return [
    { label: 'Length n', value: wholeNumber(v), grade: 'proved', note: 'the points of the design' },
    { label: 'Weight w', value: wholeNumber(w), grade: 'proved' },
    { label: 'Words M', value: wholeNumber(b), grade: 'proved', note: 'the blocks of the design' },
    distance,
  ];
}

function graded(label: string, known: Graded<Enclosure>, text: (e: Enclosure) => string = enclosureText): TitleRow {
  return { label, value: text(known.value), grade: known.grade, note: methodOf(known) };
}

function rateRow({ k, n }: CodePrediction): TitleRow {
  const { lower, upper } = k.value;
  const value =
    lower === upper ? scientific(lower / n, 4) : `${scientific(lower / n, 4)} to ${scientific(upper / n, 4)}`;
  return { label: 'Rate', value, grade: k.grade, note: 'k / n' };
}

function radiusRow({ oneStepRadius: radius }: CodePrediction): TitleRow {
  return {
    label: 'One-step radius',
    value: `${wholeNumber(radius.value)} ${radius.value === 1 ? 'error' : 'errors'}`,
    grade: radius.grade,
    note: methodOf(radius),
  };
}

/** The method, and its source unless the method already names it. */
function methodOf({ method, source }: Pick<Graded<unknown>, 'method' | 'source'>): string {
  return !source || method.includes(String(source.year)) ? method : `${method} (${shortCitation(source)})`;
}
