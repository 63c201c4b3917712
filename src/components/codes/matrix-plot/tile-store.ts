import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import { shadeTable } from './colours.ts';
import { countTile, fullShade, TILE } from './density.ts';

/** Tiles drawn ahead and kept while they are in use, so that a frame only copies pixels. */
export interface TileStore {
  /** The tile if it is already there. */
  peek(level: number, tx: number, ty: number): HTMLCanvasElement | undefined;
  /** Draws the tile when it is missing. */
  make(level: number, tx: number, ty: number): HTMLCanvasElement;
  /** Forgets everything, for another ground. */
  clear(): void;
}

/** Least recently used tiles go first; 256 KB each. */
const MOST_KEPT = 320;

export function createTileStore(H: SparseMatrix, ink: () => string): TileStore {
  const kept = new Map<string, HTMLCanvasElement>();
  const counts = new Uint32Array(TILE * TILE);
  // One for all tiles: a quarter of a megabyte each would keep the collector busy between frames.
  const image = new ImageData(TILE, TILE);
  const pixels = new Uint32Array(image.data.buffer);
  const nameOf = (level: number, tx: number, ty: number) => `${level}/${tx}/${ty}`;

  const peek: TileStore['peek'] = (level, tx, ty) => {
    const name = nameOf(level, tx, ty);
    const tile = kept.get(name);
    if (tile) {
      kept.delete(name);
      kept.set(name, tile);
    }
    return tile;
  };

  const draw = (level: number, tx: number, ty: number): HTMLCanvasElement => {
    countTile(H, level, tx, ty, counts);
    const full = fullShade(H, level);
    const shades = shadeTable(ink(), full);
    const tile = document.createElement('canvas');
    tile.width = TILE;
    tile.height = TILE;
    const context = tile.getContext('2d');
    if (!context) return tile;
    for (let i = 0; i < counts.length; i++) {
      const count = counts[i]!;
      pixels[i] = count > 0 ? shades[Math.min(count, full)]! : 0;
    }
    context.putImageData(image, 0, 0);
    return tile;
  };

  return {
    peek,
    make(level, tx, ty) {
      const there = peek(level, tx, ty);
      if (there) return there;
      const tile = draw(level, tx, ty);
      kept.set(nameOf(level, tx, ty), tile);
      if (kept.size > MOST_KEPT) kept.delete(kept.keys().next().value!);
      return tile;
    },
    clear: () => kept.clear(),
  };
}
