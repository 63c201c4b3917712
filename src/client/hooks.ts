import { useEffect } from 'react';
import useSWR, { type SWRConfiguration, type SWRResponse, useSWRConfig } from 'swr';
import type { z } from 'zod';
import type { Endpoint } from '@/api/endpoint.ts';
import { endpoints } from '@/api/endpoints.ts';
import { type ApiFailure, addressOf, type CallInput, call } from './api.ts';

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

/** Refreshes a run's cached answer whenever the server says that it changed. */
export function useRunEvents(runId: string): void {
  const { mutate } = useSWRConfig();
  useEffect(() => {
    const source = new EventSource(`/api/v1/runs/${encodeURIComponent(runId)}/events`);
    const refresh = () => void mutate(addressOf(endpoints.getRun, { params: { id: runId } }));
    source.addEventListener('run', refresh);
    return () => source.close();
  }, [runId, mutate]);
}
