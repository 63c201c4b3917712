import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import type { DecoderSpec } from '../decoders/decoder-spec.ts';
import { type BitTable, rememberedTable } from '../decoders/finite-alphabet.ts';
import { flippingThresholds, iterationCap, messageThresholds, minSumSettings } from '../decoders/settings.ts';
import { columnDegrees, largestDegree } from '../decoders/tanner-graph.ts';
import { bitFlippingKernel } from './bit-flipping-kernel.ts';
import { finiteAlphabetKernel } from './finite-alphabet-kernel.ts';
import { gallagerKernel } from './gallager-kernel.ts';
import { planGraph } from './graph-plan.ts';
import type { KernelImage } from './kernel-image.ts';
import { largestCountKernel } from './largest-count-kernel.ts';
import { minSumKernel } from './min-sum-kernel.ts';
import { peelingKernel } from './peeling-kernel.ts';
import { sumProductKernel } from './sum-product-kernel.ts';

type Emitter = () => KernelImage;
type Of<K extends DecoderSpec['kind']> = Extract<DecoderSpec, { kind: K }>;

/** What emits the kernel of a decoder for a matrix; null where there is none. Settings are checked here, before anything
 *  is emitted.
 *  @throws ParamError on settings that the matrix does not allow. */
export function emitterFor(decoder: DecoderSpec, H: SparseMatrix): Emitter | null {
  const degrees = columnDegrees(H);
  const cap = iterationCap(decoder);
  switch (decoder.kind) {
    case 'majority-logic': {
      const thresholds = degrees.map((d) => Math.floor(d / 2) + 1);
      return () =>
        bitFlippingKernel(planGraph(H, [thresholds]), { cap, remembersReceived: false, stopsWhenStuck: false });
    }
    case 'bit-flipping': {
      const thresholds = flippingThresholds(degrees, decoder);
      return () =>
        bitFlippingKernel(planGraph(H, [thresholds]), { cap, remembersReceived: false, stopsWhenStuck: true });
    }
    case 'bit-flipping-max':
      return () => largestCountKernel(planGraph(H), { cap, single: false });
    case 'finite-alphabet':
      return finiteAlphabet(H, degrees, decoder, cap);
    case 'peeling':
      return () => peelingKernel(planGraph(H, [], { rowsInOrder: true }), cap);
    case 'gradient-descent':
      return gradientDescent(H, degrees, decoder, cap);
    case 'gallager-a':
    case 'gallager-b':
      return gallager(H, degrees, decoder, cap);
    case 'min-sum': {
      const settings = minSumSettings(degrees, decoder);
      const rowsInOrder = settings.schedule === 'layered';
      return () => minSumKernel(planGraph(H, [], { rowsInOrder }), settings);
    }
    case 'sum-product':
      return () => sumProductKernel(planGraph(H), cap);
    default:
      return null;
  }
}

/** With v the failing checks, and one more where the bit differs from the received one, Δ_j = 1 + d_j − 2v. A whole
 *  number is below θ when it is at most ⌈θ⌉ − 1: when v ≥ (2 + d_j − ⌈θ⌉)/2. */
function gradientDescent(H: SparseMatrix, degrees: Uint32Array, spec: Of<'gradient-descent'>, cap: number): Emitter {
  if (spec.flips === 'single') {
    const most = largestDegree(degrees);
    return () => largestCountKernel(planGraph(H, [degrees.map((d) => most - d)]), { cap, single: true });
  }
  const bound = Math.ceil(spec.threshold ?? -0.5);
  const least = degrees.map((d) => Math.min(d + 2, Math.max(0, Math.ceil((2 + d - bound) / 2))));
  return () => bitFlippingKernel(planGraph(H, [least]), { cap, remembersReceived: true, stopsWhenStuck: true });
}

/** What this kernel does not take the readable decoder refuses, with its reasons. */
function finiteAlphabet(
  H: SparseMatrix,
  degrees: Uint32Array,
  spec: Of<'finite-alphabet'>,
  cap: number,
): Emitter | null {
  const table: BitTable = spec.table ?? rememberedTable;
  const symmetric = table.every((row, a) => row.every((level, b) => level === table[b]![a]));
  if (!symmetric || degrees.some((d) => d !== 3)) return null;
  return () => finiteAlphabetKernel(planGraph(H), table, cap);
}

function gallager(H: SparseMatrix, degrees: Uint32Array, spec: Of<'gallager-a' | 'gallager-b'>, cap: number): Emitter {
  const thresholds = messageThresholds(degrees, spec);
  const half = degrees.map((d) => Math.ceil(d / 2));
  const changes = thresholds.length > 1;
  const messagesAreDecisions = !changes && thresholds[0]!.every((b, j) => b === half[j]);
  // Thresholds that change are given by iteration and the same for all columns.
  const schedule = changes ? thresholds.map((list) => list[0]!) : null;
  return () => gallagerKernel(planGraph(H, [thresholds[0]!, half]), { cap, schedule, messagesAreDecisions });
}
