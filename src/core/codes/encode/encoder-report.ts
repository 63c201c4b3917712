import { seededRandom } from '../../algebra/seeded-random.ts';
import { LimitError, ParamError } from '../../errors.ts';
import type { Graded } from '../../evidence.ts';
import { type SparseMatrix, syndrome } from '../sparse-matrix.ts';
import { approximateTriangularEncoder } from './approximate-triangular.ts';
import { circulantForms, denseForms, type EncoderForm, registerForms, triangularForms } from './encoder-forms.ts';
import { parityRegisterEncoder, type ShiftRegister, shiftRegister } from './shift-register.ts';
import { type SystematicCirculants, systematicCirculants } from './systematic-circulants.ts';
import { type SystematicEncoder, systematicEncoder, type WordEncoder } from './systematic-encoder.ts';

export type EncoderKind = 'shift-register' | 'circulants' | 'triangular' | 'systematic';

/** An encoder that the code has, with its counts; or why it has none. */
export type EncoderEntry =
  | {
      kind: EncoderKind;
      title: string;
      available: true;
      forms: GradedForm[];
      /** Random words that were encoded and checked: all satisfied every check and showed their information bits. */
      wordsChecked: number;
      /** Lines of its own: polynomials, taps, block size, gap. */
      details: { label: string; text: string }[];
      source: string;
    }
  | { kind: EncoderKind; title: string; available: false; reason: string; proved: boolean };

export type GradedForm = Pick<EncoderForm, 'form'> & {
  [count in 'xor2' | 'and2' | 'flipFlops' | 'romBits' | 'cycles']: Graded<number>;
};

export interface EncoderReport {
  n: number;
  k: number;
  encoders: EncoderEntry[];
}

/** Ones of P beyond which a dense generator is not counted here. */
const MOST_DENSE_STEPS = 1.5e10;
/** Exponents shown of a polynomial. */
const SHOWN_EXPONENTS = 24;

/** All encoders of {c : H·c = 0}, each tried on random words before it is reported; the simplest that suits the code first.
 *  @throws ParamError when the matrix has no columns; Error when an encoder fails a check, a fault of this program. */
export function encoderReport(
  code: { H: SparseMatrix },
  options: { seed?: string; words?: number; onProgress?(share: number): void } = {},
): EncoderReport {
  const { H } = code;
  if (H.cols < 1) throw new ParamError('H', `${H.rows} × ${H.cols}`, 'a matrix with columns');
  const words = options.words ?? 8;
  const seed = options.seed ?? 'encoders';
  const { onProgress } = options;
  const register = shiftRegister(H);
  onProgress?.(0.1);
  const systematic = attempt(() => {
    if (!register) refuseLong(H);
    return systematicEncoder(code);
  });
  onProgress?.(0.3);
  const triangular = attempt(() => approximateTriangularEncoder(H));
  onProgress?.(0.6);
  const circulants = attempt(() => systematicCirculants(H));
  onProgress?.(0.8);
  const check = (encoder: WordEncoder) => checkWords(H, encoder, words, seed);
  const encoders = [
    registerEntry(register, systematic, check),
    circulantEntry(circulants, check),
    triangular instanceof LimitError || triangular instanceof ParamError
      ? unavailable('triangular', triangular.message)
      : entry('triangular', triangularForms(triangular, H.cols), check(triangular), [
          { label: 'Gap', text: `${triangular.gap} of ${H.cols - triangular.k} parity bits` },
        ]),
    systematic instanceof LimitError || systematic instanceof ParamError
      ? unavailable('systematic', systematic.message)
      : entry('systematic', denseForms(systematic, H.cols), check(systematic), [
          { label: 'Information positions', text: runsText(systematic.infoPositions) },
        ]),
  ];
  const k = [systematic, triangular].find((found): found is SystematicEncoder => 'k' in found)?.k ?? register?.k;
  if (k === undefined) throw new LimitError('encoders of a matrix', H.colIndex.length, MOST_DENSE_STEPS, 'steps');
  return { n: H.cols, k, encoders };
}

const TITLES: Record<EncoderKind, [title: string, source: string]> = {
  'shift-register': ['Shift register', 'W. W. Peterson, E. J. Weldon 1972, Error-Correcting Codes, ch. 8'],
  circulants: [
    'Generator of circulants',
    'Z. Li, L. Chen, L. Zeng, S. Lin, W. H. Fong 2006, Efficient encoding of quasi-cyclic low-density parity-check codes, IEEE Trans. Commun. 54, 71–81',
  ],
  triangular: [
    'Approximate lower triangle',
    'T. J. Richardson, R. L. Urbanke 2001, Efficient encoding of low-density parity-check codes, IEEE Trans. Inf. Theory 47, 638–656',
  ],
  systematic: [
    'Systematic generator',
    'F. J. MacWilliams, N. J. A. Sloane 1977, The Theory of Error-Correcting Codes, ch. 1, §2',
  ],
};

function entry(
  kind: EncoderKind,
  forms: EncoderForm[],
  wordsChecked: number,
  details: { label: string; text: string }[],
): EncoderEntry {
  const [title, source] = TITLES[kind];
  return { kind, title, available: true, forms: forms.map(graded), wordsChecked, details, source };
}

function unavailable(kind: EncoderKind, reason: string, proved = false): EncoderEntry {
  return { kind, title: TITLES[kind][0], available: false, reason, proved };
}

function graded({ form, method, ...counts }: EncoderForm): GradedForm {
  const count = (value: number): Graded<number> => ({ value, grade: 'computed', method });
  const { xor2, and2, flipFlops, romBits, cycles } = counts;
  return {
    form,
    xor2: count(xor2),
    and2: count(and2),
    flipFlops: count(flipFlops),
    romBits: count(romBits),
    cycles: count(cycles),
  };
}

function registerEntry(
  register: ShiftRegister | null,
  systematic: SystematicEncoder | LimitError | ParamError,
  check: (encoder: WordEncoder) => number,
): EncoderEntry {
  if (!register) return unavailable('shift-register', 'the cyclic shift does not keep the set of checks', true);
  const checked = check(parityRegisterEncoder(register)) + ('encode' in systematic ? check(systematic) : 0);
  return entry('shift-register', registerForms(register), checked, [
    { label: 'Generator polynomial', text: exponentsText(register.generator) },
    { label: 'Parity polynomial', text: exponentsText(register.parity) },
    { label: 'Taps', text: `${register.taps.length} stages besides the first take the feedback` },
  ]);
}

function circulantEntry(
  found: ReturnType<typeof systematicCirculants> | LimitError | ParamError,
  check: (encoder: SystematicCirculants) => number,
): EncoderEntry {
  if (found instanceof LimitError || found instanceof ParamError) return unavailable('circulants', found.message);
  if ('reason' in found) return unavailable('circulants', found.reason, found.proved);
  return entry('circulants', circulantForms(found), check(found), [
    { label: 'Block size', text: String(found.z) },
    { label: 'Parity blocks', text: runsText(Uint32Array.from(found.parityBlocks)) },
  ]);
}

/** Encodes random words; how many, when each satisfies every check and shows its information bits. */
export function checkWords(H: SparseMatrix, encoder: WordEncoder, words: number, seed: string): number {
  const random = seededRandom(seed);
  for (let i = 0; i < words; i++) {
    const info = Uint8Array.from({ length: encoder.k }, () => random.below(2));
    const word = encoder.encode(info);
    const shown = encoder.infoPositions.every((c, at) => word[c] === info[at]);
    if (!shown || syndrome(H, word).includes(1)) throw new Error('an encoder made a word that is no codeword');
  }
  return words;
}

/** What was asked for, or the limit or parameter that forbids it. */
function attempt<T>(make: () => T): T | LimitError | ParamError {
  try {
    return make();
  } catch (error) {
    if (error instanceof LimitError || error instanceof ParamError) return error;
    throw error;
  }
}

function refuseLong({ rows, cols }: SparseMatrix): void {
  const steps = (rows * Math.min(rows, cols) * cols) / 32;
  if (steps > MOST_DENSE_STEPS) throw new LimitError('a dense generator', steps, MOST_DENSE_STEPS, 'steps');
}

function exponentsText(exponents: readonly number[]): string {
  const shown = exponents.slice(-SHOWN_EXPONENTS).reverse();
  const rest = exponents.length - shown.length;
  const term = (e: number) => (e === 0 ? '1' : e === 1 ? 'x' : `x^${e}`);
  return `${shown.map(term).join(' + ')}${rest > 0 ? ` + … (${exponents.length} terms)` : ''}`;
}

/** Ascending numbers as runs: 0–3, 7, 9–12. */
function runsText(numbers: Uint32Array): string {
  const runs: string[] = [];
  for (let i = 0; i < numbers.length; ) {
    let end = i;
    while (numbers[end + 1] === numbers[end]! + 1) end++;
    runs.push(end === i ? String(numbers[i]) : `${numbers[i]}–${numbers[end]}`);
    i = end + 1;
  }
  const shown = runs.slice(0, SHOWN_EXPONENTS);
  return shown.join(', ') + (runs.length > shown.length ? `, … (${numbers.length} in all)` : '') || 'none';
}
