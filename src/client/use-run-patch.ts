import { useState } from 'react';
import { useSWRConfig } from 'swr';
import { endpoints } from '@/api/endpoints.ts';
import { ApiFailure, addressOf, type CallInput, call } from './api.ts';

type Patch = NonNullable<CallInput<typeof endpoints.patchRun>['body']>;

/** Changes a run by a word to the server. */
export function useRunPatch(runId: string) {
  const { mutate } = useSWRConfig();
  const [isBusy, setIsBusy] = useState(false);
  const [failure, setFailure] = useState<ApiFailure | null>(null);
  /** @returns whether the server took it. */
  const patch = async (change: Patch): Promise<boolean> => {
    setIsBusy(true);
    setFailure(null);
    try {
      await call(endpoints.patchRun, { params: { id: runId }, body: change });
      await mutate(addressOf(endpoints.getRun, { params: { id: runId } }));
      return true;
    } catch (error) {
      if (!(error instanceof ApiFailure)) throw error;
      setFailure(error);
      return false;
    } finally {
      setIsBusy(false);
    }
  };
  return { patch, isBusy, failure };
}
