import type { Code } from '@/api/codes.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { scientific, wholeNumber } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';

/** A property by key, with its grade beside it. */
function Known({ code, name }: { code: Code; name: string }) {
  const property = code.properties.find(({ key }) => key === name);
  if (!property) return <span className="text-quiet">not known</span>;
  return (
    <span className="inline-flex items-baseline gap-2 whitespace-nowrap">
      {property.text}
      <Grade grade={property.grade} method={property.method} />
    </span>
  );
}

const numberOf = (code: Code, name: string) =>
  code.properties.find(({ key }) => key === name)?.number ?? Number.POSITIVE_INFINITY;

const COLUMNS: Column<Code>[] = [
  {
    key: 'name',
    header: 'code',
    sortBy: (code) => code.name,
    cell: (code) => (
      <a className="link font-semibold" href={paths.code(code.projectId, code.id)}>
        {code.name}
      </a>
    ),
  },
  { key: 'design', header: 'design', sortBy: (code) => code.designTitle, cell: (code) => code.designTitle },
  { key: 'n', header: 'n', kind: 'number', sortBy: (code) => code.n, cell: (code) => wholeNumber(code.n) },
  { key: 'k', header: 'k', kind: 'number', sortBy: (code) => code.k, cell: (code) => wholeNumber(code.k) },
  {
    key: 'rate',
    header: 'rate',
    kind: 'number',
    sortBy: (code) => code.k / code.n,
    cell: (code) => (code.k / code.n).toFixed(3),
  },
  {
    key: 'girth',
    header: 'girth',
    kind: 'number',
    sortBy: (code) => numberOf(code, 'girth'),
    cell: (code) => <Known code={code} name="girth" />,
  },
  {
    key: 'distance',
    header: 'distance',
    kind: 'number',
    sortBy: (code) => numberOf(code, 'distance'),
    cell: (code) => <Known code={code} name="distance" />,
  },
  {
    key: 'ones',
    header: 'ones',
    kind: 'number',
    sortBy: (code) => code.ones,
    cell: (code) => scientific(code.ones),
  },
];

/** The codes kept in a project; every column sorts. */
export default function CodeList({ codes }: { codes: readonly Code[] }) {
  return <DataTable caption="Codes kept in this project" columns={COLUMNS} rows={codes} rowKey={(code) => code.id} />;
}
