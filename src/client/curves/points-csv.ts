import { csvLine } from '@/api/csv-line.ts';
import type { RunState } from '@/api/runs.ts';
import { type Curve, type CurvePoint, type Estimate, isThin } from './curve.ts';
import { curveDecoderText } from './curve-source.ts';

/** What the file says of a run beside its points. */
export interface RunNote {
  name: string;
  seed: string;
  state: RunState;
}

const COLUMNS = [
  'run',
  'seed',
  'code',
  'n',
  'k',
  'decoder',
  'channel',
  'p',
  'frames',
  'frame errors',
  'bit errors',
  'undetected',
  'mean iterations',
  'FER',
  'FER lower',
  'FER upper',
  'BER',
  'BER lower',
  'BER upper',
  'level',
  'evidence',
  'mark',
] as const;

/** The figures of curves as rows of text, heads first. A rate of which no error was seen is left empty and only its
 *  upper limit given: a reader of the file must not take it for 0. */
export function pointRows(curves: readonly Curve[], runNote: (runId: string) => RunNote | undefined): string[][] {
  const rows = curves.flatMap((curve) => curve.points.map((point) => pointRow(curve, point, runNote(curve.runId))));
  return [[...COLUMNS], ...rows];
}

function pointRow(curve: Curve, point: CurvePoint, note: RunNote | undefined): string[] {
  return [
    note?.name ?? curve.runId,
    note?.seed ?? '',
    curve.codeLabel,
    String(curve.n),
    String(curve.k),
    curveDecoderText(curve),
    'binary symmetric',
    String(point.p),
    String(point.frames),
    String(point.frameErrors),
    String(point.bitErrors),
    String(point.undetected),
    Number.isNaN(point.iterationsMean) ? '' : point.iterationsMean.toPrecision(6),
    ...estimateCells(point.fer),
    ...estimateCells(point.ber),
    String(point.level),
    point.grade ?? 'sampled',
    markOf(point),
  ];
}

const estimateCells = ({ value, lower, upper }: Estimate): string[] =>
  value === null ? ['', '', digits(upper)] : [digits(value), digits(lower), digits(upper)];

const digits = (x: number): string => String(Number(x.toPrecision(8)));

const markOf = (point: CurvePoint): string =>
  point.grade === 'bounded'
    ? 'from weight strata'
    : point.frameErrors === 0
      ? 'no error seen, upper limit only'
      : isThin(point)
        ? 'thin'
        : '';

/** A whole CSV file. */
export const csvText = (rows: readonly (readonly string[])[]): string => rows.map(csvLine).join('');

/** For the clipboard: cells parted by tabs, as spreadsheets paste them. */
export const tabbedText = (rows: readonly (readonly string[])[]): string =>
  rows.map((row) => row.map((cell) => cell.replaceAll(/[\t\r\n]/g, ' ')).join('\t')).join('\n');
