/** Kernels compiled and at work: modules are kept by matrix, instances with their memory for the next shard. */

import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { Tally } from '../simulation/tally.ts';
import type { WeightTable } from '../simulation/weight-table.ts';
import { weightOf } from '../simulation/weight-table.ts';
import type { KernelImage } from './kernel-image.ts';
import { control } from './memory-layout.ts';

/** What a shard's frames are drawn from. */
export interface Draws {
  frames: number;
  /** The generator's first state. */
  random: Uint32Array;
  /** Weights of the patterns: one weight, or the law of independent errors. */
  weights: number | WeightTable;
  /** P(0) − P(1) of a received 0, for kernels that want it. */
  bias: number;
}

interface Instance {
  memory: WebAssembly.Memory;
  /** Does so many steps; 1 when the shard is drained. */
  run(steps: number): number;
  /** Fills the free lanes without decoding. */
  refill(): void;
  exports: WebAssembly.Exports;
}

/** One kernel's module and the instances that wait for work. */
export class CompiledKernel {
  readonly #idle: Instance[] = [];
  private constructor(
    readonly image: KernelImage,
    readonly module: WebAssembly.Module,
  ) {}

  static async compile(image: KernelImage): Promise<CompiledKernel> {
    return new CompiledKernel(image, await WebAssembly.compile(image.bytes));
  }

  /** An instance of its own for one shard; `keep` hands it back once the shard is drained. */
  async take(): Promise<Instance> {
    const waiting = this.#idle.pop();
    if (waiting) return waiting;
    const { exports } = await WebAssembly.instantiate(this.module);
    const memory = exports.memory as WebAssembly.Memory;
    this.image.writeTables(memory.buffer);
    return { memory, run: exports.run as Instance['run'], refill: exports.refill as Instance['refill'], exports };
  }

  /** Keeps one instance; a drained one has no frame in any lane, and needs no more than `begin`. */
  keep(instance: Instance): void {
    if (this.#idle.length === 0) this.#idle.push(instance);
  }

  /** Lets the memory of the waiting instances go. */
  dropIdle(): void {
    this.#idle.length = 0;
  }

  get idleBytes(): number {
    return this.#idle.length * this.image.memoryBytes;
  }
}

/** Sets counters to 0 and the draws to the shard's first frame. */
export function begin({ memory }: Pick<Instance, 'memory'>, image: KernelImage, draws: Draws): void {
  const words = new Uint32Array(memory.buffer);
  const wordAt = (place: number) => place >> 2;
  words.fill(0, wordAt(control.frameErrors), wordAt(control.parameter));
  new Float64Array(memory.buffer)[control.parameter >> 3] = draws.bias;
  words.fill(0, wordAt(image.places.histogram), wordAt(image.places.histogram) + image.cap + 2);
  words.set(draws.random, wordAt(control.random));
  words[wordAt(control.left)] = draws.frames;
  const { weights } = draws;
  words[wordAt(control.weight)] = typeof weights === 'number' ? weights : 0xffffffff;
  if (typeof weights === 'number') return;
  words[wordAt(control.tableLength)] = weights.hi.length;
  weights.lo.forEach((low, w) => {
    words[wordAt(image.places.weights.table) + 2 * w] = low;
    words[wordAt(image.places.weights.table) + 2 * w + 1] = weights.hi[w]!;
  });
  for (let top = 0; top < 256; top++)
    words[wordAt(image.places.weights.guide) + top] = weightOf(weights, top * 2 ** 24, 0);
}

/** What the drained shard came to. */
export function readTally({ memory }: Pick<Instance, 'memory'>, image: KernelImage, frames: number): Tally {
  const words = new Uint32Array(memory.buffer);
  const counter = (place: number) => words[(place >> 2) + 1]! * 2 ** 32 + words[place >> 2]!;
  const first = image.places.histogram >> 2;
  const histogram = [...words.subarray(first, first + image.cap + 1)];
  while (histogram.length > 0 && histogram.at(-1) === 0) histogram.pop();
  return {
    frames,
    frameErrors: counter(control.frameErrors),
    bitErrors: counter(control.bitErrors),
    bitErrorsSquared: counter(control.bitErrorsSquared),
    undetected: counter(control.undetected),
    iterations: histogram.reduce((sum, count, i) => sum + count * i, 0),
    bits: frames * image.n,
    iterationHistogram: histogram,
  };
}

/** Kernels whose memory may wait for another shard, and the bytes of it over all of them. */
const mostRecent = 8;
const mostIdleBytes = 64 * 2 ** 20;

const kernels = new WeakMap<SparseMatrix, Map<string, Promise<CompiledKernel>>>();
const recent: CompiledKernel[] = [];

/** The compiled kernel of a matrix under a name, emitted and compiled at the first call. */
export function kernelOf(H: SparseMatrix, name: string, emit: () => KernelImage): Promise<CompiledKernel> {
  let byName = kernels.get(H);
  if (!byName) {
    byName = new Map();
    kernels.set(H, byName);
  }
  const known = byName.get(name);
  if (known) return known;
  const compiled = CompiledKernel.compile(emit());
  byName.set(name, compiled);
  return compiled;
}

/** Hands an instance back, and lets older idle memory go where there is too much. */
export function giveBack(kernel: CompiledKernel, instance: Instance): void {
  kernel.keep(instance);
  const place = recent.indexOf(kernel);
  if (place >= 0) recent.splice(place, 1);
  recent.push(kernel);
  let bytes = recent.reduce((sum, k) => sum + k.idleBytes, 0);
  while (recent.length > mostRecent || (recent.length > 0 && bytes > mostIdleBytes)) {
    const oldest = recent.shift()!;
    bytes -= oldest.idleBytes;
    oldest.dropIdle();
  }
}
