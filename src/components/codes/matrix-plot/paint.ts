import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { PlotColours } from './colours.ts';
import { firstAtLeast, TILE } from './density.ts';
import type { TileStore } from './tile-store.ts';
import { type Frame, levelFor, type View, visibleCells } from './view.ts';

/** From here on cells are drawn one by one, below it as tiles. */
const CELLS_FROM_SCALE = 3;
const GRID_FROM_SCALE = 9;
/** Time for drawing missing tiles in one frame of 16.7 ms; copying them takes as much again on large screens. */
const TILE_BUDGET_MS = 4;
const COARSEST_FALLBACK = 5;

export interface Scene {
  context: CanvasRenderingContext2D;
  H: SparseMatrix;
  frame: Frame;
  colours: PlotColours;
  tiles: TileStore;
  now: () => number;
}

/** Draws one frame. Answers false when tiles are still missing and another frame should follow. */
export function paint(scene: Scene, view: View): boolean {
  const { context, frame, colours } = scene;
  context.setTransform(1, 0, 0, 1, 0, 0);
  context.fillStyle = colours.sheet;
  context.fillRect(0, 0, frame.width, frame.height);
  const complete = view.scale >= CELLS_FROM_SCALE ? paintCells(scene, view) : paintTiles(scene, view);
  outline(scene, view);
  return complete;
}

function paintCells({ context, H, frame, colours }: Scene, view: View): true {
  const { row0, row1, col0, col1 } = visibleCells(view, frame);
  const { scale } = view;
  const gap = scale >= 6 ? 1 : 0;
  if (scale >= GRID_FROM_SCALE) {
    context.fillStyle = colours.hair;
    const top = Math.max(0, (row0 - view.y) * scale);
    const left = Math.max(0, (col0 - view.x) * scale);
    const bottom = (row1 - view.y) * scale;
    const right = (col1 - view.x) * scale;
    for (let c = col0; c <= col1; c++) context.fillRect(Math.round((c - view.x) * scale), top, 1, bottom - top);
    for (let r = row0; r <= row1; r++) context.fillRect(left, Math.round((r - view.y) * scale), right - left, 1);
  }
  context.fillStyle = colours.ink;
  for (let r = row0; r < row1; r++) {
    const top = Math.round((r - view.y) * scale) + gap;
    const height = Math.round((r + 1 - view.y) * scale) - top;
    const end = H.rowStart[r + 1]!;
    for (let e = firstAtLeast(H, r, col0); e < end && H.colIndex[e]! < col1; e++) {
      const left = Math.round((H.colIndex[e]! - view.x) * scale) + gap;
      context.fillRect(left, top, Math.round((H.colIndex[e]! + 1 - view.x) * scale) - left, height);
    }
  }
  return true;
}

function paintTiles(scene: Scene, view: View): boolean {
  const { context, frame, tiles, now } = scene;
  const level = levelFor(view.scale);
  const side = TILE * 2 ** level;
  const { row0, row1, col0, col1 } = visibleCells(view, frame);
  const started = now();
  let complete = true;
  context.imageSmoothingEnabled = view.scale * 2 ** level < 1;
  for (let ty = Math.floor(row0 / side); ty * side < row1; ty++) {
    for (let tx = Math.floor(col0 / side); tx * side < col1; tx++) {
      const hasTime = now() - started < TILE_BUDGET_MS;
      const tile = hasTime ? tiles.make(level, tx, ty) : tiles.peek(level, tx, ty);
      if (tile) copyTile(scene, view, tile, tx, ty, side, 0, 0, TILE);
      else {
        complete = false;
        copyCoarser(scene, view, level, tx, ty);
      }
    }
  }
  return complete;
}

/** Shows the part of a coarser tile that is already there, until the right one is. */
function copyCoarser(scene: Scene, view: View, level: number, tx: number, ty: number): void {
  for (let up = 1; up <= COARSEST_FALLBACK; up++) {
    const tile = scene.tiles.peek(level + up, tx >> up, ty >> up);
    if (!tile) continue;
    const part = TILE >> up;
    const mask = (1 << up) - 1;
    copyTile(scene, view, tile, tx, ty, TILE * 2 ** level, (tx & mask) * part, (ty & mask) * part, part);
    return;
  }
}

function copyTile(
  { context }: Scene,
  view: View,
  tile: HTMLCanvasElement,
  tx: number,
  ty: number,
  side: number,
  sx: number,
  sy: number,
  part: number,
): void {
  // Edges are rounded, not sizes, so that neighbours meet without a seam.
  const left = Math.round((tx * side - view.x) * view.scale);
  const top = Math.round((ty * side - view.y) * view.scale);
  const right = Math.round(((tx + 1) * side - view.x) * view.scale);
  const bottom = Math.round(((ty + 1) * side - view.y) * view.scale);
  context.drawImage(tile, sx, sy, part, part, left, top, right - left, bottom - top);
}

function outline({ context, frame, colours }: Scene, view: View): void {
  context.strokeStyle = colours.quiet;
  context.lineWidth = 1;
  context.strokeRect(
    Math.round(-view.x * view.scale) + 0.5,
    Math.round(-view.y * view.scale) + 0.5,
    Math.round(frame.cols * view.scale) - 1,
    Math.round(frame.rows * view.scale) - 1,
  );
}
