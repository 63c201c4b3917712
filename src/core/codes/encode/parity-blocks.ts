import { type SparseMatrix, transpose } from '../sparse-matrix.ts';

/** Choices of block columns tried after the first, and word operations that all may take together. */
const MOST_CHOICES = 4000;
const MOST_STEPS = 3e9;

/** `count` block columns of z columns each whose rank is count·z, the last ones first; null when there are none, or none was
 *  found. */
export function blockColumnsOfFullRank(
  H: SparseMatrix,
  z: number,
  count: number,
): { blocks: number[] | null; proved: boolean } {
  const search = new BlockSearch(H, z, count);
  const blocks = search.extend([], H.cols / z - 1);
  return { blocks: blocks && [...blocks].sort((a, b) => a - b), proved: search.complete };
}

class BlockSearch {
  complete = true;
  private readonly columns: SparseMatrix;
  private readonly basis: ColumnBasis;
  private choices = 0;
  private steps = 0;

  constructor(
    H: SparseMatrix,
    private readonly z: number,
    private readonly count: number,
  ) {
    this.columns = transpose(H);
    this.basis = new ColumnBasis(H.rows, z * count);
  }

  /** Depth first: a block whose columns are not all independent of those taken cannot be in a choice with them. */
  extend(taken: number[], last: number): number[] | null {
    if (taken.length === this.count) return taken;
    for (let block = last; block >= this.count - taken.length - 1; block--) {
      if (this.choices++ > MOST_CHOICES || this.steps > MOST_STEPS) {
        this.complete = false;
        return null;
      }
      const before = this.basis.size;
      this.steps += this.z * (before + this.z) * this.basis.stride;
      if (this.insert(block)) {
        const found = this.extend([...taken, block], block - 1);
        if (found || !this.complete) return found;
      }
      this.basis.truncate(before);
    }
    return null;
  }

  private insert(block: number): boolean {
    const { rowStart, colIndex } = this.columns;
    for (let c = block * this.z; c < (block + 1) * this.z; c++) {
      if (!this.basis.insert(colIndex.subarray(rowStart[c], rowStart[c + 1]))) return false;
    }
    return true;
  }
}

/** Independent vectors over GF(2), each with a leading one of its own; those put in last can be taken out again. */
class ColumnBasis {
  size = 0;
  readonly stride: number;
  private readonly words: Int32Array;
  private readonly leads: number[] = [];
  private readonly vectorOfLead: Int32Array;

  constructor(length: number, most: number) {
    this.stride = (length + 31) >>> 5;
    this.words = new Int32Array(this.stride * (most + 1));
    this.vectorOfLead = new Int32Array(length).fill(-1);
  }

  /** Whether the vector is independent of those there; it is then one of them. */
  insert(ones: Uint32Array): boolean {
    const { words, stride, vectorOfLead } = this;
    const at = this.size * stride;
    words.fill(0, at, at + stride);
    for (const r of ones) words[at + (r >>> 5)]! ^= 1 << (r & 31);
    for (let w = 0; w < stride; w++) {
      for (let word = words[at + w]!; word !== 0; word = words[at + w]!) {
        const lead = 32 * w + 31 - Math.clz32(word & -word);
        const other = vectorOfLead[lead]!;
        if (other < 0) {
          vectorOfLead[lead] = this.size++;
          this.leads.push(lead);
          return true;
        }
        for (let i = w; i < stride; i++) words[at + i]! ^= words[other * stride + i]!;
      }
    }
    return false;
  }

  truncate(size: number): void {
    while (this.size > size) {
      this.vectorOfLead[this.leads.pop()!] = -1;
      this.size--;
    }
  }
}
