/** One measured figure. `must` and `aim` are bounds in the same unit; `better` says on which side of them is good. */
export interface Row {
  metric: string;
  value: number;
  unit: string;
  must?: number;
  aim?: number;
  better?: 'lower' | 'higher';
  /** Anything a reader must know: what was left out, and why. */
  note?: string;
}
