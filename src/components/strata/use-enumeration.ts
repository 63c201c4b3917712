import { useEffect, useRef, useState } from 'react';
import { enumerateWeight } from '@/client/strata/enumeration.ts';
import type { StrataEvidence } from '@/client/strata/use-strata-evidence.ts';

/** Enumerates one weight at a time; leaving the page stops it, and what was done is kept. */
export function useEnumeration({ code, group }: Pick<StrataEvidence, 'code' | 'group'>) {
  const [weight, setWeight] = useState<number | null>(null);
  const [failure, setFailure] = useState<{ weight: number; message: string } | null>(null);
  const abort = useRef<AbortController | null>(null);
  useEffect(() => () => abort.current?.abort(), []);
  const begin = async (next: number) => {
    if (!code || weight !== null) return;
    abort.current = new AbortController();
    const { signal } = abort.current;
    setWeight(next);
    setFailure(null);
    try {
      await enumerateWeight(code, group.decoder, next, signal);
    } catch (error) {
      if (!signal.aborted) setFailure({ weight: next, message: (error as Error).message });
    }
    setWeight(null);
  };
  return { weight, failure, begin: (next: number) => void begin(next), cancel: () => abort.current?.abort() };
}
