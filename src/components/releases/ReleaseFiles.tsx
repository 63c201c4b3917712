import { endpoints } from '@/api/endpoints.ts';
import type { Release, ReleaseFile } from '@/api/releases.ts';
import { addressOf } from '@/client/api.ts';
import { buttonClass } from '@/components/ui/Button.tsx';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Fingerprint } from '../codes/PropertiesBlock.tsx';
import { sizeText } from './size-text.ts';

interface Props {
  release: Pick<Release, 'id' | 'state' | 'bundle'>;
  files: readonly ReleaseFile[];
}

const hrefOf = (id: string, name: string) => addressOf(endpoints.getReleaseFile, { params: { id, name } });

/** The bundle, then each file with its digest. */
export function ReleaseFiles({ release, files }: Props) {
  const { id, bundle, state } = release;
  return (
    <div className="grid min-w-0 gap-6">
      <div className="border border-ink bg-sheet px-3 py-3">
        <p className="flex flex-wrap items-center gap-x-4 gap-y-2" data-screen-only>
          <a
            className={buttonClass({ kind: state === 'withdrawn' ? 'outline' : 'primary' })}
            href={hrefOf(id, bundle.name)}
            download
          >
            Download the bundle
          </a>
          <span className="text-quiet">
            {bundle.name}, {sizeText(bundle.sizeBytes)}
          </span>
        </p>
        <h3 className="mt-3 font-normal text-body text-quiet">SHA-256 of the bundle</h3>
        <Fingerprint hex={bundle.sha256} />
      </div>
      <DataTable caption="Files" showCaption columns={columns(id)} rows={files} rowKey={({ name }) => name} />
    </div>
  );
}

const columns = (id: string): Column<ReleaseFile>[] => [
  {
    key: 'name',
    header: 'file',
    cell: (file) => (
      <>
        <a className="link font-semibold" href={hrefOf(id, file.name)} download>
          {file.name}
        </a>
        <span className="block text-quiet text-tiny">{file.title}</span>
      </>
    ),
  },
  {
    key: 'size',
    header: 'size',
    kind: 'number',
    cell: (file) => <span className="whitespace-nowrap">{sizeText(file.sizeBytes)}</span>,
  },
  {
    key: 'digest',
    header: 'SHA-256',
    cell: (file) => <code className="block min-w-72 break-all font-mono text-tiny">{file.sha256}</code>,
  },
];
