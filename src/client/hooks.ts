import { useEffect } from 'react';
import useSWR, { type SWRConfiguration, type SWRResponse, useSWRConfig } from 'swr';
import type { z } from 'zod';
import type { Endpoint } from '@/api/endpoint.ts';
import { endpoints } from '@/api/endpoints.ts';
import { runEventSchema } from '@/api/runs.ts';
import { type ApiFailure, addressOf, type CallInput, call } from './api.ts';
import { type KnownRun, mergeRunEvent } from './merge-run-event.ts';

const askEveryMs = 5000;

/** The answer of a GET endpoint, cached by address and refreshed on focus; `null` input waits. */
export function useApi<E extends Endpoint>(
  endpoint: E,
  input: Pick<CallInput<E>, 'params' | 'query'> | null,
  options: SWRConfiguration = {},
): SWRResponse<z.output<E['response']>, ApiFailure> {
  return useSWR<z.output<E['response']>, ApiFailure>(
    input && addressOf(endpoint, input),
    () => call(endpoint, input ?? {}),
    options,
  );
}

/** Keeps a run's cached answer up to date by the server's word; while that does not come, by asking. */
export function useRunEvents(runId: string): void {
  const { mutate, cache } = useSWRConfig();
  useEffect(() => {
    const key = addressOf(endpoints.getRun, { params: { id: runId } });
    const source = new EventSource(`/api/v1/runs/${encodeURIComponent(runId)}/events`);
    const take = ({ data }: MessageEvent<string>) => {
      const event = runEventSchema.safeParse(JSON.parse(data));
      // What is not fetched yet comes whole; merging into nothing would throw away the answer that is on its way.
      if (!event.success || cache.get(key)?.data === undefined) return void mutate(key);
      const merge = (known: KnownRun | undefined) => known && mergeRunEvent(known, event.data);
      void mutate(key, merge, { revalidate: false });
    };
    source.addEventListener('run', take);
    const asking = setInterval(() => {
      if (source.readyState !== EventSource.OPEN) void mutate(key);
    }, askEveryMs);
    return () => {
      clearInterval(asking);
      source.close();
    };
  }, [runId, mutate, cache]);
}
