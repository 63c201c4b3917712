import type { ReactNode } from 'react';
import type { CandidateRow } from '@/api/catalogue.ts';
import { enclosureText } from '@/components/codes/enclosure-text.ts';
import { classes } from '@/components/ui/classes.ts';
import { Grade } from '@/components/ui/Grade.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { SortColumn } from '@/core/catalogue/query.ts';
import type { Enclosure } from '@/core/evidence.ts';
import { standingOf, structureOf } from './candidate-words.ts';

export interface TableColumn {
  key: string;
  label: string;
  widthRem: number;
  sort?: SortColumn;
  /** Numbers stand right in the mono face. */
  number?: boolean;
  cell(row: CandidateRow): ReactNode;
}

/** Every column but the construction's, in the order shown. */
export const tableColumns: readonly TableColumn[] = [
  { key: 'n', label: 'n', sort: 'n', number: true, widthRem: 4.25, cell: ({ n }) => wholeNumber(n) },
  { key: 'k', label: 'k', sort: 'k', number: true, widthRem: 5, cell: (row) => atLeast(dimensionOf(row), wholeNumber) },
  {
    key: 'rate',
    label: 'rate',
    sort: 'rate',
    number: true,
    widthRem: 5,
    cell: (row) => atLeast(rateOf(row), (value) => value.toFixed(3)),
  },
  {
    key: 'girth',
    label: 'girth',
    sort: 'girth',
    number: true,
    widthRem: 3.5,
    cell: ({ girth }) => atLeast(girth, wholeNumber),
  },
  {
    key: 'distance',
    label: 'distance',
    sort: 'distance',
    number: true,
    widthRem: 9,
    cell: ({ distance }) => (
      <span className="flex items-baseline justify-end gap-2" title={enclosureText(distance)}>
        <span className="truncate">{atLeast(distance, wholeNumber)}</span>
        <Grade grade={distance.grade} method={distance.method} />
      </span>
    ),
  },
  {
    key: 'radius',
    label: 'radius',
    sort: 'radius',
    number: true,
    widthRem: 4,
    cell: ({ radius }) => wholeNumber(radius),
  },
  {
    key: 'columnWeight',
    label: 'column weight',
    sort: 'columnWeight',
    number: true,
    widthRem: 7.5,
    cell: ({ columnWeight }) => wholeNumber(columnWeight),
  },
  {
    key: 'rowWeight',
    label: 'row weight',
    sort: 'rowWeight',
    number: true,
    widthRem: 6,
    cell: ({ rowWeight }) => wholeNumber(rowWeight),
  },
  {
    key: 'parity',
    label: 'parity bits',
    sort: 'parity',
    number: true,
    widthRem: 6,
    cell: ({ rank }) => atMost(rank, wholeNumber),
  },
  { key: 'structure', label: 'structure', widthRem: 6.75, cell: structureOf },
  { key: 'standing', label: 'requirements', widthRem: 9, cell: (row) => <Stands row={row} /> },
];

/** Shown first where there is little room. */
const priority = [
  'n',
  'rate',
  'standing',
  'distance',
  'k',
  'girth',
  'radius',
  'structure',
  'columnWeight',
  'rowWeight',
  'parity',
];
/** Shown without being asked for on a wide screen; the others wait to be chosen. */
const usual = 7;
/** Room that a construction's name should have, and the least that it is given. */
const nameRem = 16;
export const constructionRem = 12;
export const gapRem = 0.75;

/** The columns asked for, or as many of the usual ones as the room takes. Where nothing is required, none says how it
 *  stands. */
export function columnsFor(asked: readonly string[] | null, widthRem: number, judged: boolean): TableColumn[] {
  if (asked) return tableColumns.filter(({ key }) => asked.includes(key));
  let left = widthRem - nameRem;
  const kept = new Set<string>();
  for (const key of priority.filter((name) => judged || name !== 'standing').slice(0, usual)) {
    const column = tableColumns.find((candidate) => candidate.key === key)!;
    left -= column.widthRem + gapRem;
    if (left < 0) break;
    kept.add(key);
  }
  return tableColumns.filter(({ key }) => kept.has(key));
}

export const dimensionOf = ({ n, rank }: CandidateRow): Enclosure => ({ lower: n - rank.upper, upper: n - rank.lower });
export const rateOf = ({ n, rank }: CandidateRow): Enclosure => ({
  lower: 1 - rank.upper / n,
  upper: 1 - rank.lower / n,
});

/** In a table one end is enough; the panel writes both. */
const atLeast = ({ lower, upper }: Enclosure, text: (value: number) => string) =>
  text(lower) === (Number.isFinite(upper) ? text(upper) : '') ? text(lower) : `≥\u202f${text(lower)}`;
const atMost = ({ lower, upper }: Enclosure, text: (value: number) => string) =>
  lower === upper ? text(upper) : `≤\u202f${text(upper)}`;

export function Stands({ row }: { row: CandidateRow }) {
  const { kind, word } = standingOf(row);
  return (
    <span
      className={classes('font-semibold', kind === 'pass' && 'text-pass', kind === 'thin' && 'text-thin')}
      title={word}
    >
      {word}
    </span>
  );
}
