import { ParamError } from '../../errors.ts';
import { type ReducedEchelon, reducedEchelon } from '../../gf2/echelon.ts';
import { quasiCyclicForm } from '../../gf2/quasi-cyclic.ts';
import { findRank } from '../../gf2/rank.ts';
import type { SparseMatrix } from '../sparse-matrix.ts';
import { blockColumnsOfFullRank } from './parity-blocks.ts';
import type { WordEncoder } from './systematic-encoder.ts';

/** A generator [I | P] whose parts are z × z circulants, up to the order of the blocks (Li, Chen, Zeng, Lin and Fong 2006,
 *  "Efficient encoding of quasi-cyclic low-density parity-check codes"). */
export interface SystematicCirculants extends WordEncoder {
  z: number;
  /** Blocks of z positions that hold parity, and information, ascending. */
  parityBlocks: number[];
  infoBlocks: number[];
  /** Ones of the first row of each circulant of P: firstRows[i][j] ties information block i to parity block j. */
  firstRows: number[][][];
}

/** Why a matrix has no such generator. */
export interface NoCirculants {
  reason: string;
  /** False when only the choices of parity blocks that were tried failed. */
  proved: boolean;
}

/** For blocks of z it exists exactly when some block columns of H, as many as rank/z, have full rank: then the others are
 *  free. Circulant parts follow, since the shift of every block at once keeps the code. All block sizes that the code has
 *  are tried, the largest first; the reason given is that of the largest. */
export function systematicCirculants(H: SparseMatrix): SystematicCirculants | NoCirculants {
  const largest = quasiCyclicForm(H)?.size;
  if (largest === undefined)
    return { reason: 'moving blocks of positions round does not keep the set of checks', proved: true };
  const { rank } = findRank(H);
  const failures: NoCirculants[] = [];
  for (let z = largest; z > 1; z--) {
    if (H.cols % z !== 0 || (z !== largest && !quasiCyclicForm(H, z))) continue;
    const blocks = parityBlocksFor(H, z, rank);
    if (Array.isArray(blocks)) return generatorOn(H, z, blocks);
    failures.push(blocks);
  }
  return { reason: failures[0]!.reason, proved: failures.every(({ proved }) => proved) };
}

function parityBlocksFor(H: SparseMatrix, z: number, rank: number): number[] | NoCirculants {
  if (z === H.cols)
    return { reason: 'the code is cyclic: one block, for which a shift register is the encoder', proved: true };
  if (rank === H.cols) return { reason: 'the code holds the zero word alone', proved: true };
  if (rank % z !== 0) {
    const count = Math.ceil(rank / z);
    return {
      reason: `rank ${rank} is no multiple of the block size ${z}, so no whole blocks hold the parity: ${count} blocks have ${count * z - rank} positions too many; the rows that generate it as a module are circulants, but do not show the information`,
      proved: true,
    };
  }
  const { blocks, proved } = blockColumnsOfFullRank(H, z, rank / z);
  if (blocks) return blocks;
  const tried = proved ? `no ${rank / z} block columns` : 'none of the choices of block columns tried';
  return { reason: `${tried} of the matrix ${proved ? 'have' : 'has'} rank ${rank}`, proved };
}

function generatorOn(H: SparseMatrix, z: number, parityBlocks: number[]): SystematicCirculants {
  const isParity = new Set(parityBlocks);
  const infoBlocks = Array.from({ length: H.cols / z }, (_, b) => b).filter((b) => !isParity.has(b));
  const columnsOf = (b: number) => Array.from({ length: z }, (_, i) => b * z + i);
  const order = Uint32Array.from([...parityBlocks, ...infoBlocks].flatMap(columnsOf));
  const firstRows = firstRowsOf(reducedEchelon(H, order), z, parityBlocks, infoBlocks);
  const infoPositions = Uint32Array.from(infoBlocks.flatMap(columnsOf));
  const k = infoPositions.length;
  return {
    z,
    k,
    infoPositions,
    parityBlocks,
    infoBlocks,
    firstRows,
    encode(info) {
      if (info.length !== k) throw new ParamError('info', info.length, `${k} information bits`);
      const word = new Uint8Array(H.cols);
      for (let i = 0; i < k; i++) {
        if (!(info[i]! & 1)) continue;
        word[infoPositions[i]!] = 1;
        const shift = i % z;
        firstRows[Math.floor(i / z)]!.forEach((ones, j) => {
          const start = parityBlocks[j]! * z;
          for (const p of ones) word[start + (p + shift < z ? p + shift : p + shift - z)]! ^= 1;
        });
      }
      return word;
    },
  };
}

/** Row i of the reduced form says which information positions the parity position pivots[i] sums; the first position of an
 *  information block names the first row of its circulants. */
function firstRowsOf(
  { pivots, matrix }: ReducedEchelon,
  z: number,
  parityBlocks: number[],
  infoBlocks: number[],
): number[][][] {
  const rowOfPosition = new Map(Array.from(pivots, (c, i) => [c, i]));
  return infoBlocks.map((info) =>
    parityBlocks.map((parity) => {
      const ones: number[] = [];
      for (let p = 0; p < z; p++) if (matrix.get(rowOfPosition.get(parity * z + p)!, info * z)) ones.push(p);
      return ones;
    }),
  );
}
