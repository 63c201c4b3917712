import type { AnalysableCode } from '../analyse-ldpc.ts';
import type { Property } from '../properties.ts';

/** What is known of a code before anything is asked of it: enough to say whether a question fits. */
export interface CodeOutline {
  n: number;
  k: number;
  /** Pairs of weight and how many columns have it, ascending. */
  columnWeights: readonly (readonly [number, number])[];
  ones: number;
}

export interface ExamineOptions {
  /** What a search may spend, in seconds of a usual machine; counted in operations, so that the answer is the same on all. */
  seconds: number;
  /** Told the share done, where it is known. */
  onProgress?(share: number): void;
}

/** Values side by side, each of which the lines hold too, with its grade. */
export interface AnswerTable {
  of: string;
  columns: string[];
  rows: (string | number)[][];
}

export interface CodeAnswer {
  /** Each with its grade, method and source. */
  lines: Property[];
  /** Sets or words found, as a file. */
  list?: { fileName: string; text: string };
  /** Pairs of a value and how many columns have it. */
  histogram?: { of: string; bars: [number, number][] };
  table?: AnswerTable;
}

/** Something that takes time of its own to find out about a code; cards.ts says of which codes it is asked. */
export interface CodeQuestion {
  /** @throws LimitError when a limit is passed; ParamError when the code does not fit. */
  answer(code: AnalysableCode, options: ExamineOptions): CodeAnswer;
}
