import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';

/** Nodes of both kinds that are still told apart on paper. */
export const MOST_NODES = 200;

export const isDrawable = (rows: number, cols: number): boolean => rows + cols <= MOST_NODES;

export interface TannerNode {
  kind: 'bit' | 'check';
  index: number;
  x: number;
  y: number;
}

export interface TannerLayout {
  width: number;
  height: number;
  bits: TannerNode[];
  checks: TannerNode[];
  /** Pairs of check and bit. */
  edges: [check: number, bit: number][];
}

const STEP = 14;
const MARGIN = 14;

/** Bits on one line, checks on another beneath, each spread over the whole width. */
export function tannerLayout(H: SparseMatrix): TannerLayout {
  const width = 2 * MARGIN + STEP * Math.max(H.rows, H.cols, 2);
  const height = Math.max(150, Math.min(360, width / 3));
  const along = (kind: TannerNode['kind'], count: number, y: number): TannerNode[] =>
    Array.from({ length: count }, (_, index) => ({ kind, index, x: (width * (index + 0.5)) / count, y }));
  const edges: [number, number][] = [];
  for (let r = 0; r < H.rows; r++)
    for (let e = H.rowStart[r]!; e < H.rowStart[r + 1]!; e++) edges.push([r, H.colIndex[e]!]);
  return { width, height, bits: along('bit', H.cols, MARGIN), checks: along('check', H.rows, height - MARGIN), edges };
}

/** The nodes that share an edge with one. */
export function neighboursOf({ edges }: TannerLayout, { kind, index }: Pick<TannerNode, 'kind' | 'index'>): number[] {
  return edges.flatMap(([check, bit]) =>
    kind === 'bit' ? (bit === index ? [check] : []) : check === index ? [bit] : [],
  );
}
