import type { SparseMatrix } from '../codes/sparse-matrix.ts';
import { satisfies } from './tanner-graph.ts';

/** What a channel hands over: hard bits 0 and 1 (with `erased` where nothing came through), or real channel outputs,
 *  positive for 0. */
export type Received = Uint8Array | Float64Array;

/** The mark of an erased bit in a received or decoded word. */
export const erased = 2;

export interface Decoded {
  /** The decoder's own buffer, overwritten by the next frame. Bits left erased hold the mark `erased`. */
  word: Uint8Array;
  iterations: number;
  /** Whether every check holds for the word. */
  converged: boolean;
}

/** One frame at a time. `begin` and `step` do the work of `decode` an iteration a call, so that a caller can stop
 *  within a long frame; `step` returns null until the frame has ended. */
export interface Decoder {
  decode(received: Received): Decoded;
  begin(received: Received): void;
  step(): Decoded | null;
}

/** What tells one iterative decoder from another. */
export interface DecodingRule {
  /** The current word x. */
  readonly word: Uint8Array;
  /** Takes a new frame; the word becomes the received hard word. */
  start(received: Received): void;
  /** Does iteration number `iteration`, counted from 0. False when it would change nothing more: the frame ends there
   *  and the iteration is not counted. */
  iterate(iteration: number): boolean;
}

/** The frame loop that all iterative decoders share: the syndrome of the current word is tested before the first
 *  iteration and after each one; at the cap the current word stands. */
export function iterativeDecoder(H: SparseMatrix, cap: number, rule: DecodingRule): Decoder {
  let iterations = 0;
  return fromSteps({
    begin(received) {
      rule.start(received);
      iterations = 0;
    },
    step() {
      if (satisfies(H, rule.word)) return { word: rule.word, iterations, converged: true };
      if (iterations === cap || !rule.iterate(iterations)) return { word: rule.word, iterations, converged: false };
      iterations += 1;
      return null;
    },
  });
}

export function fromSteps(steps: Pick<Decoder, 'begin' | 'step'>): Decoder {
  return {
    ...steps,
    decode(received) {
      steps.begin(received);
      for (;;) {
        const decoded = steps.step();
        if (decoded) return decoded;
      }
    },
  };
}
