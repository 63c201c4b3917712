import { endpoints } from '@/api/endpoints.ts';
import type { Fleet } from '@/api/fleet.ts';
import { useApi } from '@/client/hooks.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';

const askEveryMs = 5000;

/** Where runs can be computed besides browsers, and who has joined; how to add a fleet where there is none. */
export default function FleetPage() {
  const { data: fleet, error } = useApi(endpoints.getFleet, {}, { refreshInterval: askEveryMs });
  if (!fleet) return <p className="text-quiet">{error?.message ?? 'The server is being asked.'}</p>;
  return (
    <div className="grid gap-6">
      <p>
        This server computes with {counted(fleet.serverThreads, 'thread')}, release{' '}
        <span className="font-mono">{fleet.release}</span>.
      </p>
      {fleet.redis === 'off' ? <HowToAdd release={fleet.release} /> : <Machines fleet={fleet} />}
    </div>
  );
}

function Machines({ fleet }: { fleet: Fleet }) {
  return (
    <>
      {fleet.redis === 'down' && (
        <Notice kind="caution" word="Redis does not answer" live>
          Shards that were committed are safe; those handed out are handed out again once it answers. Runs of the fleet
          wait; move one to the server to go on at once.
        </Notice>
      )}
      <DataTable
        caption="Machines"
        showCaption
        columns={COLUMNS}
        rows={fleet.machines}
        rowKey={({ name, since }) => `${name} ${since}`}
        empty={
          <>
            No machine has joined. On each, with release {fleet.release} and the same REDIS_URL:{' '}
            <code className="font-mono">npm run fleet</code>
          </>
        }
      />
    </>
  );
}

const COLUMNS: Column<Fleet['machines'][number]>[] = [
  { key: 'name', header: 'machine', cell: ({ name }) => name },
  { key: 'threads', header: 'threads', kind: 'number', cell: ({ threads }) => wholeNumber(threads) },
  { key: 'shards', header: 'shards', kind: 'number', cell: ({ shards }) => wholeNumber(shards) },
  { key: 'since', header: 'since', cell: ({ since }) => dateText(since) },
  {
    key: 'release',
    header: 'release',
    cell: ({ release, refused }) =>
      refused ? (
        <>
          <span className="font-mono">{release}</span> <strong className="text-fail">refused</strong>: {refused}
        </>
      ) : (
        <span className="font-mono">{release}</span>
      ),
  },
];

function HowToAdd({ release }: { release: string }) {
  return (
    <section aria-labelledby="add" className="max-w-prose">
      <h2 id="add" className="mb-2">
        Add a fleet
      </h2>
      <p>Runs go on in browsers and on this server without one. To compute on more machines:</p>
      <ol className="mt-2 grid list-decimal gap-2 pl-5">
        <li>
          Start Redis or Valkey where this server and the machines reach it, for instance Debian’s{' '}
          <code className="font-mono">redis-server</code>, with a password and not open to others.
        </li>
        <li>
          Start this server with{' '}
          <code className="font-mono [overflow-wrap:anywhere]">REDIS_URL=redis://:password@host:6379</code>.
        </li>
        <li>
          On each machine, with release <span className="font-mono">{release}</span> of this program and the same
          REDIS_URL: <code className="font-mono">npm run fleet</code>. A machine of another release is told so and takes
          no work.
        </li>
      </ol>
      <p className="mt-3 text-quiet text-tiny">
        Results are kept in this server’s database, not in Redis: what is lost with Redis is computed again. The server
        computes a part of what machines hand in once more and counts no machine that differs.
      </p>
    </section>
  );
}
