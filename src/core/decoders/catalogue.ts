import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { Citation } from '../errors.ts';
import type { DecoderSpec } from './decoder-spec.ts';

/** What an engineer needs to know to choose a decoder. */
export interface DecoderCard {
  kind: DecoderSpec['kind'];
  title: string;
  reads: 'hard bits' | 'erasures' | 'hard bits or real outputs';
  /** When it is the right one, in a sentence. */
  choose: string;
  /** Visits to an edge of the Tanner graph in one iteration; each is an addition, a comparison or a table look-up. */
  edgeVisitsPerIteration: number;
  /** What one visit costs, in words. */
  visit: string;
  source: Citation;
}

const gallager1963: Citation = {
  authors: 'R. G. Gallager',
  year: 1963,
  title: 'Low-Density Parity-Check Codes',
  where: 'MIT Press',
  part: 'Chapter 4',
};

export const decoderCards: readonly DecoderCard[] = [
  {
    kind: 'majority-logic',
    title: 'One-step majority logic',
    reads: 'hard bits',
    choose: 'Column weights above about 8 and a latency of one step, with a radius that is proved.',
    edgeVisitsPerIteration: 2,
    visit: 'one exclusive or, one count',
    source: { authors: 'J. L. Massey', year: 1963, title: 'Threshold Decoding', where: 'MIT Press' },
  },
  {
    kind: 'gallager-a',
    title: 'Gallager A',
    reads: 'hard bits',
    choose: 'Column weight 3, where it is Gallager B; at larger weights it changes its mind too late.',
    edgeVisitsPerIteration: 3,
    visit: 'one exclusive or, one count, one comparison',
    source: gallager1963,
  },
  {
    kind: 'gallager-b',
    title: 'Gallager B',
    reads: 'hard bits',
    choose:
      'One bit a message where reading is hard: better than bit flipping at small column weights, for more wires.',
    edgeVisitsPerIteration: 3,
    visit: 'one exclusive or, one count, one comparison',
    source: gallager1963,
  },
  {
    kind: 'bit-flipping',
    title: 'Bit flipping',
    reads: 'hard bits',
    choose: 'Large column weights, as of the geometries: nearly the rate of Gallager B at the least cost of all.',
    edgeVisitsPerIteration: 2,
    visit: 'one exclusive or, one count',
    source: gallager1963,
  },
  {
    kind: 'bit-flipping-max',
    title: 'Bit flipping by largest count',
    reads: 'hard bits',
    choose: 'A last stage for frames that a threshold left over: slow and careful, with no threshold to set.',
    edgeVisitsPerIteration: 2,
    visit: 'one exclusive or, one count, and a maximum over the word',
    source: gallager1963,
  },
  {
    kind: 'gradient-descent',
    title: 'Gradient-descent bit flipping',
    reads: 'hard bits',
    choose: 'Bit flipping that also minds the received word: small column weights with a hundred iterations to spend.',
    edgeVisitsPerIteration: 2,
    visit: 'one exclusive or, one count',
    source: {
      authors: 'T. Wadayama, K. Nakamura, M. Yagita, Y. Funahashi, S. Usami, I. Takumi',
      year: 2010,
      title: 'Gradient descent bit flipping algorithms for decoding LDPC codes',
      where: 'IEEE Trans. Commun. 58, 1610–1614',
    },
  },
  {
    kind: 'finite-alphabet',
    title: 'Finite-alphabet, seven levels',
    reads: 'hard bits',
    choose: 'Column weight 3 on hard bits with a low floor in three bits a message; the built-in table is from memory.',
    edgeVisitsPerIteration: 3,
    visit: 'one minimum, one table look-up',
    source: {
      authors: 'S. K. Planjery, D. Declercq, L. Danjean, B. Vasić',
      year: 2013,
      title: 'Finite alphabet iterative decoders, part I',
      where: 'IEEE Trans. Commun. 61, 4033–4045',
    },
  },
  {
    kind: 'peeling',
    title: 'Peeling',
    reads: 'erasures',
    choose: 'Erasures at the least cost; what it leaves is a stopping set.',
    edgeVisitsPerIteration: 1,
    visit: 'one count, one exclusive or',
    source: {
      authors: 'M. G. Luby, M. Mitzenmacher, M. A. Shokrollahi, D. A. Spielman',
      year: 2001,
      title: 'Efficient erasure correcting codes',
      where: 'IEEE Trans. Inf. Theory 47, 569–584',
    },
  },
  {
    kind: 'elimination',
    title: 'Elimination',
    reads: 'erasures',
    choose:
      'Erasures as well as any decoder can, where a cubic number of word operations in the erasures is no matter.',
    edgeVisitsPerIteration: 1,
    visit: 'one bit set; then elimination, of the order of the cube of the erasures over 32 word operations',
    source: {
      authors: 'C. Di, D. Proietti, İ. E. Telatar, T. J. Richardson, R. L. Urbanke',
      year: 2002,
      title: 'Finite-length analysis of low-density parity-check codes on the binary erasure channel',
      where: 'IEEE Trans. Inf. Theory 48, 1570–1579',
    },
  },
  {
    kind: 'sum-product',
    title: 'Sum-product',
    reads: 'hard bits or real outputs',
    choose: 'The yardstick of soft decoding, for what a code can do rather than for what will be built.',
    edgeVisitsPerIteration: 3,
    visit: 'one hyperbolic tangent and its inverse, two products, in floating point',
    source: {
      authors: 'F. R. Kschischang, B. J. Frey, H.-A. Loeliger',
      year: 2001,
      title: 'Factor graphs and the sum-product algorithm',
      where: 'IEEE Trans. Inf. Theory 47, 498–519',
    },
  },
  {
    kind: 'min-sum',
    title: 'Min-sum, 8-bit',
    reads: 'hard bits or real outputs',
    choose: 'What hardware builds: close to sum-product when scaled for the code, layered in half the iterations.',
    edgeVisitsPerIteration: 2,
    visit: 'one subtraction, two comparisons, one addition, in 8 bits',
    source: {
      authors: 'M. P. C. Fossorier, M. Mihaljević, H. Imai',
      year: 1999,
      title: 'Reduced complexity iterative decoding of low-density parity check codes based on belief propagation',
      where: 'IEEE Trans. Commun. 47, 673–680',
    },
  },
  {
    kind: 'two-stage',
    title: 'Stages',
    reads: 'hard bits',
    choose: 'A cheap decoder for the many easy frames and a strong one for the few it leaves unconverged.',
    edgeVisitsPerIteration: 2,
    visit: 'as in the stage at work',
    source: gallager1963,
  },
];

export function decoderCard(kind: DecoderSpec['kind']): DecoderCard {
  return decoderCards.find((card) => card.kind === kind)!;
}

/** All that counts of a matrix here: its columns and its ones. */
type Sized = Pick<SparseMatrix, 'cols'> & { colIndex: { length: number } };

/** Edge visits a code bit: those of the iterations done, and one syndrome test more than iterations. The energy-free
 *  cost of a run, the same on every machine.
 *  @param iterationsPerFrame Mean over the frames of a run. */
export function edgeVisitsPerBit(H: Sized, decoder: DecoderSpec, iterationsPerFrame: number): number {
  const edgesPerBit = H.colIndex.length / H.cols;
  const visits = decoderCard(decoder.kind).edgeVisitsPerIteration;
  return edgesPerBit * (iterationsPerFrame * visits + iterationsPerFrame + 1);
}
