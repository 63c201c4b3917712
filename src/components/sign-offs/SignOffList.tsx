import type { SignOff } from '@/api/sign-offs.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { paths } from '@/paths.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
import { SignOffState } from './SignOffState.tsx';

const COLUMNS: Column<SignOff>[] = [
  {
    key: 'code',
    header: 'code',
    sortBy: (signOff) => signOff.codeName,
    cell: (signOff) => (
      <a className="link font-semibold" href={paths.signOff(signOff.projectId, signOff.id)}>
        {signOff.codeName}
      </a>
    ),
  },
  {
    key: 'state',
    header: 'state',
    sortBy: (signOff) => signOff.state,
    cell: (signOff) => <SignOffState state={signOff.state} />,
  },
  {
    key: 'asked',
    header: 'asked for',
    sortBy: (signOff) => signOff.askedAt,
    cell: (signOff) => <Deed at={signOff.askedAt} by={signOff.askedBy} />,
  },
  {
    key: 'decided',
    header: 'decided',
    sortBy: (signOff) => signOff.decision?.at ?? '',
    cell: ({ decision }) =>
      decision ? <Deed at={decision.at} by={decision.by} /> : <span className="text-quiet">not yet</span>,
  },
  {
    key: 'digest',
    header: 'digest',
    cell: (signOff) => <code className="font-mono text-tiny">{signOff.digest.slice(0, 16)}…</code>,
  },
];

function Deed({ at, by }: { at: string; by: string }) {
  return (
    <>
      <span className="whitespace-nowrap">{dateText(at)}</span> <span className="text-quiet">by {by}</span>
    </>
  );
}

/** The sign-offs of a project, newest first. */
export default function SignOffList({ signOffs }: { signOffs: readonly SignOff[] }) {
  return <DataTable caption="Sign-offs, newest first" columns={COLUMNS} rows={signOffs} rowKey={({ id }) => id} />;
}
