// The figures of the fast decoders: each against a textbook program in C++ and against its own algorithm in AVX2 C++, in
// one run, in interleaved rounds of processor time; ratios are medians over the rounds. Run by hand, with nothing else on.
import { buildDesign, type DecoderSpec, deriveLdpc, type SparseMatrix } from '../../src/core/index.ts';
import { fastShard } from '../../src/core/kernels/index.ts';
import { taskRows } from './kernel-tasks.ts';
import { compileNative, runNative, writeCode } from './native/programs.ts';
import type { Row } from './row.ts';

const rounds = 5;
const textbookSeconds = 0.4;
const avx2Seconds = 0.3;

interface Code {
  id: string;
  title: string;
  H: SparseMatrix;
  degree: number;
  /** p of the hard and of the soft decoders, thresholds and fixed-point settings where the codes work well. */
  hardP: number;
  softP: number;
  threshold: number;
  minSum: { scale: '1/4'; c: number; rMax: number };
}

const plane = (family: string, q: number): SparseMatrix =>
  deriveLdpc(buildDesign({ family, params: { q } }), { checks: 'blocks' }).H;

export const codes = (): Code[] => [
  {
    id: 'pg16',
    title: 'PG(2,16)',
    H: plane('projective-plane', 16),
    degree: 17,
    hardP: 0.012,
    softP: 0.025,
    threshold: 10,
    minSum: { scale: '1/4', c: 16, rMax: 6 },
  },
  {
    id: 'eg32',
    title: 'EG(2,32)',
    H: plane('punctured-affine-plane', 32),
    degree: 32,
    hardP: 0.014,
    softP: 0.022,
    threshold: 19,
    minSum: { scale: '1/4', c: 16, rMax: 3 },
  },
  {
    id: 'eg64',
    title: 'EG(2,64)',
    H: plane('punctured-affine-plane', 64),
    degree: 64,
    hardP: 0.009,
    softP: 0.014,
    threshold: 36,
    minSum: { scale: '1/4', c: 12, rMax: 1 },
  },
];

interface Contest {
  name: string;
  decoder: DecoderSpec;
  p: number;
  /** Arguments of the textbook program after the code: name, p, parameter, cap. */
  textbook: readonly (string | number)[];
  /** The program of the same algorithm in AVX2 and its arguments; null where there is none. */
  avx2: readonly (string | number)[] | null;
  bounds: { must: number; aim: number };
}

function contests(code: Code, at: number): Contest[] {
  const { hardP, softP, threshold, minSum } = code;
  const bound = (must: number[], aim: number[]) => ({ must: must[at]!, aim: aim[at]! });
  return [
    {
      name: 'bit flipping',
      decoder: { kind: 'bit-flipping', threshold },
      p: hardP,
      textbook: ['bf', hardP, threshold, 20],
      avx2: ['bf', hardP, 20],
      bounds: bound([150, 100, 90], [250, 170, 150]),
    },
    {
      name: 'Gallager B',
      decoder: { kind: 'gallager-b', threshold },
      p: hardP,
      textbook: ['gb', hardP, threshold, 20],
      avx2: ['gb', hardP, 20],
      bounds: bound([100, 85, 75], [150, 130, 110]),
    },
    {
      name: 'layered min-sum',
      decoder: { kind: 'min-sum', iterations: 30, ...minSum },
      p: softP,
      textbook: ['lms', softP, 0.25, 30],
      avx2: ['lms', softP, 30],
      bounds: bound([35, 25, 15], [60, 45, 30]),
    },
    {
      name: 'sum-product',
      decoder: { kind: 'sum-product', iterations: 30 },
      p: softP,
      textbook: ['spa', softP, 0, 30],
      avx2: null,
      bounds: bound([20, 20, 20], [40, 40, 40]),
    },
  ];
}

const median = (values: readonly number[]) => [...values].sort((a, b) => a - b)[values.length >> 1]!;

/** Frames a second of processor time in a shard that takes about `seconds`. */
async function kernelRate(H: SparseMatrix, { decoder, p }: Contest): Promise<() => Promise<number>> {
  const shard = async (framesPerShard: number, index: number) => {
    const before = process.cpuUsage();
    const tally = await fastShard({ H, channel: { kind: 'bsc', p }, decoder, seed: 'bench', framesPerShard }, index);
    if (!tally) throw new Error(`no kernel for ${decoder.kind}`);
    const { user, system } = process.cpuUsage(before);
    return (user + system) / 1e6;
  };
  // Until the engine's optimising compiler has been through, and the shard is long enough to time.
  let frames = 512;
  for (let seconds = 0, index = 0; seconds < 0.4; index++) {
    seconds = await shard(frames, index);
    if (seconds < 0.4) frames *= 2;
  }
  let index = 100;
  return async () => frames / (await shard(frames, index++));
}

async function contest(code: Code, path: string, c: Contest, textbook: string | null): Promise<Row[]> {
  const rate = await kernelRate(code.H, c);
  const { scale: _, ...fixed } = code.minSum;
  const avx2 =
    c.avx2 &&
    compileNative('avx2', {
      DEGREE: code.degree,
      THRESHOLD: code.threshold,
      SHIFT: 2,
      LARGEST: fixed.rMax,
      CHANNEL: fixed.c,
    });
  const ours: number[] = [];
  const native: Record<'textbook' | 'avx2', number[]> = { textbook: [], avx2: [] };
  const perSecond = (program: string, args: readonly (string | number)[], seconds: number) => {
    const run = runNative(program, [path, ...args, seconds]);
    return run.frames / run.seconds;
  };
  for (let round = 0; round < rounds; round++) {
    ours.push(await rate());
    if (textbook) native.textbook.push(perSecond(textbook, c.textbook, textbookSeconds));
    if (avx2 && c.avx2) native.avx2.push(perSecond(avx2, c.avx2, avx2Seconds));
  }
  const label = `${code.title} ${c.name}, p = ${c.p}`;
  const ratioTo = (other: readonly number[]) => median(ours.map((value, round) => value / other[round]!));
  const rows: Row[] = [{ metric: label, value: median(ours) / 1000, unit: 'kframes/s', better: 'higher' }];
  if (textbook)
    rows.push({
      metric: `${label}: against textbook C++`,
      value: ratioTo(native.textbook),
      unit: '×',
      better: 'higher',
      ...c.bounds,
    });
  if (avx2)
    rows.push({
      metric: `${label}: against AVX2 C++`,
      value: ratioTo(native.avx2),
      unit: '×',
      better: 'higher',
      must: 0.45,
      aim: 0.6,
    });
  return rows;
}

export async function bench(): Promise<Row[]> {
  const textbook = compileNative('textbook');
  const rows: Row[] = [];
  for (const [at, code] of codes().entries()) {
    const path = writeCode(code.id, code.H);
    for (const c of contests(code, at)) rows.push(...(await contest(code, path, c, textbook)));
  }
  rows.push(...(await taskRows()));
  if (!textbook) rows.push({ metric: 'native programs left out: no C++ compiler', value: 0, unit: '' });
  return rows;
}
