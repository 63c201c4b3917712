import type { ModuleBuilder } from './assembler/index.ts';
import type { ConductorPlaces } from './conductor.ts';
import type { GraphPlan } from './graph-plan.ts';
import { inverse } from './graph-walk.ts';
import { type MemoryLayout, vectorBytes } from './memory-layout.ts';
import type { PositionSpace } from './pattern-drawing.ts';

/** A kernel ready to be compiled, with all that is needed to run shards on it. */
export interface KernelImage {
  bytes: Uint8Array<ArrayBuffer>;
  memoryBytes: number;
  n: number;
  cap: number;
  places: ConductorPlaces;
  /** Where the words lie that patterns are drawn into. */
  word: number;
  /** Nanoseconds that a step takes on a usual core, roughly: how many steps make 10 ms. */
  stepNs: number;
  /** Fills the tables of a new memory. */
  writeTables(memory: ArrayBuffer): void;
}

interface WithTables {
  write(memory: ArrayBuffer): void;
}

/** Where the kernel keeps each position's vector: in the matrix's order, or by a table. */
export function positionSpace(plan: GraphPlan, layout: MemoryLayout): WithTables & { space: PositionSpace } {
  const n = plan.H.cols;
  if (plan.plainColumns) return { space: { n, table: null }, write: () => {} };
  const table = layout.reserve(4 * n);
  const write = (memory: ArrayBuffer) =>
    new Uint32Array(memory, table, n).set(inverse(plan.columnOrder).map((place) => place * vectorBytes));
  return { space: { n, table }, write };
}

/** Closes the module over its memory; every area must have been reserved by now. */
export function finishKernel(
  m: ModuleBuilder,
  layout: MemoryLayout,
  rest: Pick<KernelImage, 'n' | 'cap' | 'places' | 'word' | 'stepNs'> & { tables: readonly WithTables[] },
): KernelImage {
  m.memory('memory', layout.pages);
  const { tables, ...kept } = rest;
  return {
    ...kept,
    bytes: m.bytes(),
    memoryBytes: layout.pages * 65536,
    writeTables: (memory) => {
      for (const table of tables) table.write(memory);
    },
  };
}
