import type { Citation } from './errors.ts';

/** How a value is known. `proved`: a theorem whose hypotheses were checked on this object. `computed`: exhaustively,
 *  here. `bounded`: a lower and an upper value. `sampled`: an estimate with an interval and a count. */
export type Grade = 'proved' | 'computed' | 'bounded' | 'sampled';

export interface Graded<T> {
  value: T;
  grade: Grade;
  /** How it was found, in a phrase: "sparse elimination", "Singer 1938". */
  method: string;
  source?: Citation;
  /** Time spent on it, when it was worth telling. */
  elapsedMs?: number;
}

/** A quantity enclosed from both sides; equal ends mean it is known exactly. */
export interface Enclosure {
  lower: number;
  upper: number;
}
