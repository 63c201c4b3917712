import type { Release } from '@/api/releases.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { paths } from '@/paths.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
import { ReleaseState } from './ReleaseState.tsx';
import { sizeText } from './size-text.ts';

const COLUMNS: Column<Release>[] = [
  {
    key: 'number',
    header: 'release',
    sortBy: (release) => release.number,
    cell: (release) => (
      <a className="link font-semibold" href={paths.release(release.projectId, release.id)}>
        Release {release.number}
      </a>
    ),
  },
  {
    key: 'state',
    header: 'state',
    sortBy: (release) => release.state,
    cell: ({ state, endings }) => {
      const successor = endings.find(({ kind }) => kind === 'superseded')?.successor;
      return (
        <>
          <ReleaseState state={state} />
          {successor && <span className="block text-quiet text-tiny">by release {successor.number}</span>}
        </>
      );
    },
  },
  {
    key: 'code',
    header: 'code',
    sortBy: (release) => release.codeName,
    cell: (release) => (
      <>
        {release.codeName}
        <code className="block font-mono text-quiet text-tiny">{release.fingerprint.slice(0, 16)}…</code>
      </>
    ),
  },
  {
    key: 'bundle',
    header: 'bundle',
    kind: 'number',
    sortBy: (release) => release.bundle.sizeBytes,
    cell: (release) => <span className="whitespace-nowrap">{sizeText(release.bundle.sizeBytes)}</span>,
  },
  {
    key: 'made',
    header: 'released',
    sortBy: (release) => release.createdAt,
    cell: (release) => (
      <>
        <span className="whitespace-nowrap">{dateText(release.createdAt)}</span>{' '}
        <span className="text-quiet">by {release.createdBy}</span>
      </>
    ),
  },
];

/** The releases of a project, newest first. */
export default function ReleaseList({ releases }: { releases: readonly Release[] }) {
  return <DataTable caption="Releases, newest first" columns={COLUMNS} rows={releases} rowKey={({ id }) => id} />;
}
