import { useEffect, useRef } from 'react';
import type { z } from 'zod';
import { endpoints } from '@/api/endpoints.ts';
import type { Point, provenanceSchema, Run } from '@/api/runs.ts';
import { useApi } from '@/client/hooks.ts';
import { type Column, DataTable } from '@/components/ui/DataTable.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { parameterText } from '../charts/rate-text.ts';
import { dateText } from './RunTitleBlock.tsx';

type Provenance = z.output<typeof provenanceSchema>;
type Source = Provenance['sources'][number];

/** Where a run's shards were computed, which were computed again, and which contradict each other or were given up. */
export function SourceTables({ run, points }: { run: Run; points: readonly Point[] }) {
  const { data, error, mutate } = useApi(endpoints.runProvenance, { params: { id: run.id } });
  const last = useRef(run.state);
  useEffect(() => {
    if (last.current !== run.state) void mutate();
    last.current = run.state;
  }, [run.state, mutate]);
  if (error) return <p className="text-quiet">{error.message}</p>;
  if (!data || data.sources.length === 0) return null;
  const nameOf = namesOf(points);
  return (
    <section aria-label="Sources" className="grid gap-3 text-tiny">
      <DataTable
        caption="Where it was computed"
        showCaption
        columns={SOURCE_COLUMNS}
        rows={data.sources}
        rowKey={({ id }) => id}
      />
      {data.conflicts.length > 0 && (
        <Notice kind="fail" word={counted(data.conflicts.length, 'contradiction')}>
          <ul className="list-disc pl-5">
            {data.conflicts.map(({ pointId, index, at, stored, posted }) => (
              <li key={`${pointId}/${index}/${at}`}>
                Shard {wholeNumber(index)} at {nameOf(pointId)}: {counted(stored.frameErrors, 'frame error')} stored,{' '}
                {wholeNumber(posted.frameErrors)} handed in at {dateText(at)}. What was stored stays.
              </li>
            ))}
          </ul>
        </Notice>
      )}
      {data.setAside.length > 0 && (
        <Notice kind="caution" word={`${counted(data.setAside.length, 'shard')} set aside`}>
          <ul className="list-disc pl-5">
            {data.setAside.map(({ pointId, index, failures, message }) => (
              <li key={`${pointId}/${index}`}>
                Shard {wholeNumber(index)} at {nameOf(pointId)} failed {wholeNumber(failures)} times: {message}
              </li>
            ))}
          </ul>
        </Notice>
      )}
    </section>
  );
}

const KIND: Record<Source['kind'], string> = {
  browser: 'browser',
  script: 'script',
  server: 'this server',
  fleet: 'fleet machine',
};

const SOURCE_COLUMNS: Column<Source>[] = [
  { key: 'label', header: 'source', cell: ({ label }) => label },
  { key: 'kind', header: 'kind', cell: ({ kind }) => KIND[kind] },
  { key: 'shards', header: 'shards', kind: 'number', cell: ({ shards }) => wholeNumber(shards) },
  { key: 'frames', header: 'frames', kind: 'number', cell: ({ frames }) => wholeNumber(frames) },
  { key: 'again', header: 're-computed', kind: 'number', cell: ({ recomputed }) => wholeNumber(recomputed) },
  { key: 'trust', header: 'standing', cell: (source) => <Standing {...source} /> },
];

function Standing({ kind, quarantinedAt, quarantinedShards, recomputed }: Source) {
  if (quarantinedAt) {
    return (
      <strong className="text-fail">
        in quarantine since {dateText(quarantinedAt)}: {counted(quarantinedShards, 'shard')} not counted
      </strong>
    );
  }
  if (kind === 'server') return 'counted';
  return recomputed > 0 ? 'counted; those computed again agree' : 'counted';
}

/** "p = 0.012" or "weight 9" of a point. */
function namesOf(points: readonly Point[]): (id: string) => string {
  const names = new Map(points.map(({ id, channel }) => [id, channelName(channel)]));
  return (id) => names.get(id) ?? 'a point';
}

function channelName(channel: Point['channel']): string {
  if (channel.kind === 'stratum') return `weight ${channel.weight}`;
  return 'p' in channel ? `p = ${parameterText(channel.p)}` : channel.kind;
}
