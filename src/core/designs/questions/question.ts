import type { OpenedDesign } from '../open-design.ts';

/** What is known of a design before anything is asked of it: enough to say whether a question fits. */
export interface DesignOutline {
  v: number;
  b: number;
  /** Common block size; null when blocks differ in size. */
  k: number | null;
  t: number;
  lambda: number;
  partialLinear: boolean;
  /** The claim was verified on the blocks. */
  holds: boolean;
}

export interface AskOptions {
  /** Text that fixes the order of a search. */
  seed?: string;
  /** Nodes a search may visit. */
  limit?: number;
  /** Told the share done, where it is known. */
  onProgress?(share: number): void;
}

/** Something that takes time of its own to find out about a built design. */
export interface DesignQuestion<A> {
  /** Why it cannot be asked of such a design, with what would be accepted; null when it can. */
  obstacle(outline: DesignOutline): string | null;
  /** @throws LimitError when a budget is passed; ParamError when the design does not fit. */
  answer(opened: OpenedDesign, options: AskOptions): A;
}

export function outlineOf({ design, claim, certificate }: OpenedDesign): DesignOutline {
  const { v, b, blockStart } = design;
  let k: number | null = b > 0 ? blockStart[1]! : null;
  for (let i = 1; i < b && k !== null; i++) if (blockStart[i + 1]! - blockStart[i]! !== k) k = null;
  return { v, b, k, ...claim, holds: certificate.holds };
}
