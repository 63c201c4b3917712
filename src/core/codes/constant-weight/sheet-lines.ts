import type { Grade } from '../../evidence.ts';
import { cite, enclosureLine, fromGraded, type Property, spaced } from '../properties.ts';
import type { ConstantWeightCode } from './constant-weight-code.ts';
import type { ConstantWeightSheet } from './constant-weight-sheet.ts';
import { choose } from './enumerative.ts';
import type { OpticalOrthogonalCode } from './optical-orthogonal.ts';
import type { Optimality, SizeVerdict } from './size-verdict.ts';

type Values = Omit<ConstantWeightSheet, 'properties'>;

/** The lines of the sheet, in the order shown. */
export function propertyLines(values: Values, code: ConstantWeightCode): Property[] {
  const { n, w, M } = values;
  return [
    line('n', 'Length n', n, 'positions counted'),
    line('w', 'Weight w', w, 'ones of every word counted'),
    line('words', 'Words M', M, code.complement ? 'complements of blocks counted' : 'blocks counted'),
    enclosureLine('distance', 'Minimum distance', values.distance),
    ...sizeLines(values.size, M),
    line('message-bits', 'Message bits', values.messageBits, '⌊log2 M⌋'),
    rateLine(n, M),
    spaceLine(n, w, M),
    fromGraded('correction', 'Errors corrected', values.correctionRadius, spaced),
    fromGraded('detection', 'Errors detected', values.detectionRadius, spaced),
    unidirectionalLine(w),
    balanceLine(values),
    { ...enclosureLine('disjunct', 'Disjunctness d', values.disjunctness), text: disjunctText(values) },
    shortenedLine(values),
    complementLine(values),
    classesLine(values),
    ...opticalLines(values.optical),
    encoderLine(values),
  ];
}

function line(key: string, label: string, number: number, method: string, text = spaced(number)): Property {
  return { key, label, text, number, grade: 'computed', method };
}

const VERDICTS: Record<Optimality, string> = {
  optimal: 'optimal: no code has more words',
  published: 'as large as the published one',
  smaller: 'not largest: a larger code is known',
  open: 'not known to be largest',
};

function sizeLines(size: SizeVerdict | null, M: number): Property[] {
  if (!size) return [];
  const { known, optimality } = size;
  const { upper, published } = known;
  const bound = {
    key: 'size-bound',
    label: 'Most words possible',
    text: spaced(upper.size),
    number: upper.size,
    grade: 'proved' as Grade,
    method: upper.by,
    source: cite(upper.source),
  };
  const share = line(
    'size-share',
    'Share of the bound',
    M / upper.size,
    'M divided by the bound',
    percent(M / upper.size),
  );
  const table: Property[] = published
    ? [
        {
          key: 'published-size',
          label: 'Published size',
          text: spaced(published.size),
          number: published.size,
          grade: published.status === 'checked' ? 'proved' : 'bounded',
          method: published.status === 'checked' ? published.reachedBy : 'recalled from the table, not computed again',
          source: cite(known.lower.source),
        },
      ]
    : [];
  const { value, grade, method, source } = optimality;
  const verdict = {
    key: 'optimality',
    label: 'Optimality',
    text: VERDICTS[value],
    grade,
    method,
    source: cite(source),
  };
  return [bound, share, ...table, verdict];
}

const percent = (share: number) => `${(100 * share).toFixed(share === 1 ? 0 : 1)} %`;

function rateLine(n: number, M: number): Property {
  const rate = M > 1 ? Math.log2(M) / n : 0;
  return line('rate', 'Rate (log2 M)/n', rate, 'log2 of the words divided by n', rate.toFixed(4));
}

/** What all words of the weight would carry: the price of the distance. */
function spaceLine(n: number, w: number, M: number): Property {
  const all = n <= 4096 ? choose(n, w) : null;
  const bits = all === null ? 0 : all.toString(2).length - 1;
  return {
    key: 'all-words-bits',
    label: 'Bits of all words of weight w',
    text: all === null ? 'not counted beyond n = 4096' : spaced(bits),
    number: all === null ? undefined : bits,
    grade: 'computed',
    method: M > 0 && all === BigInt(M) ? 'the code is all of them' : '⌊log2 C(n, w)⌋; numbered by Cover’s method',
    source: 'T. M. Cover 1973, Enumerative source encoding, IEEE Trans. Inf. Theory 19, 73–77',
  };
}

/** An error that only clears ones, or only sets them, changes the weight. */
function unidirectionalLine(w: number): Property {
  return {
    key: 'unidirectional',
    label: 'Unidirectional errors detected',
    text: 'all',
    grade: 'proved',
    method: `they change the weight, which is ${w}`,
    source:
      'C. V. Freiman 1962, Optimal error detection codes for completely asymmetric binary channels, Inf. Control 5, 64–71',
  };
}

function balanceLine({ balanced, n, w }: Values): Property {
  const text = balanced ? 'balanced: as many ones as zeros' : `${w} ones, ${n - w} zeros`;
  return { key: 'balance', label: 'Balance', text, grade: 'computed', method: balanced ? '2w = n' : '2w ≠ n' };
}

function disjunctText({ disjunctness: { value } }: Values): string {
  const { lower, upper } = value;
  return lower === upper ? spaced(lower) : `${spaced(lower)} to ${spaced(upper)}`;
}

function shortenedLine({ n, w, M, wordsOnPosition: { lower, upper } }: Values): Property {
  const span = (a: number, b: number) => (a === b ? spaced(a) : `${spaced(a)} to ${spaced(b)}`);
  return {
    key: 'shortened',
    label: 'Shortened at a position',
    text: `1 there: (${n - 1}, ${Math.max(0, w - 1)}), ${span(lower, upper)} words; 0 there: (${n - 1}, ${w}), ${span(M - upper, M - lower)} words`,
    grade: 'computed',
    method: 'words on each position counted; distances do not fall',
  };
}

function complementLine({ n, w, M, distance }: Values): Property {
  const { lower, upper } = distance.value;
  return {
    key: 'complement',
    label: 'Complement',
    text: `weight ${n - w}, ${spaced(M)} words, distance ${lower === upper ? lower : `${lower} to ${upper}`}`,
    grade: distance.grade,
    method: 'ones and zeros exchanged; distances stay',
  };
}

function classesLine({ resolution, w, n, M }: Values): Property {
  const { classes, reason, detail } = resolution;
  const count = classes ? new Set(classes).size : 0;
  const each = count > 0 ? M / count : 0;
  const found = `${spaced(count)} disjoint codes of ${spaced(each)} words, distance ${2 * Math.min(w, n - w)} in each`;
  return {
    key: 'classes',
    label: 'Parallel classes',
    text: classes ? found : reason === 'none' ? 'none' : 'not found',
    number: classes ? count : undefined,
    grade: reason === 'limit' ? 'bounded' : 'computed',
    method: detail,
  };
}

function opticalLines(optical: OpticalOrthogonalCode | null): Property[] {
  if (!optical || optical.words.length === 0) return [];
  const { n, w, lambda, words, autoCorrelation, crossCorrelation, bound, shortOrbits } = optical;
  const best = words.length === bound.value;
  return [
    {
      key: 'optical',
      label: 'Optical orthogonal code',
      text: `(${n}, ${w}, ${lambda}), ${spaced(words.length)} ${words.length === 1 ? 'word' : 'words'}${best ? ', optimal' : ` of at most ${bound.value}`}`,
      number: words.length,
      grade: best ? 'proved' : 'computed',
      method: `${bound.method}; one word an orbit${shortOrbits > 0 ? `, ${shortOrbits} short ${shortOrbits === 1 ? 'orbit' : 'orbits'} left out` : ''}`,
      source: cite(bound.source),
    },
    fromGraded('auto-correlation', 'Auto-correlation', autoCorrelation, spaced),
    fromGraded('cross-correlation', 'Cross-correlation', crossCorrelation, spaced),
  ];
}

/** Table of words against a search by halving: what storing the code takes. */
function encoderLine({ n, w, M, messageBits }: Values): Property {
  const bits = 2 ** messageBits * Math.min(n, w * Math.max(1, Math.ceil(Math.log2(n))));
  return line(
    'encoder-memory',
    'Encoder table',
    bits,
    `2^${messageBits} words of ${M}, as bits or positions of ones`,
    `${spaced(bits)} bits`,
  );
}
