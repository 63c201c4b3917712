import { useCallback, useEffect, useRef, useState } from 'react';
import type { Analysis } from '@/api/analyses.ts';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { pause } from '@/client/pause.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import type { Refusal } from '../refusal.ts';

const POLL_MS = 600;

export type KeptState =
  | { state: 'idle' }
  | { state: 'working'; analysis: Analysis | null }
  | { state: 'ended'; analysis: Analysis }
  | { state: 'refused'; refusal: Refusal };

/** A question answered on the server and kept with the code; it goes on when the page is left, and is found again. */
export function useKeptAnalysis(codeId: string, question: CodeQuestionId, open: Analysis | undefined) {
  const [kept, setKept] = useState<KeptState>(open ? { state: 'working', analysis: open } : { state: 'idle' });
  const running = useRef<AbortController | null>(null);
  const stop = useCallback(() => {
    running.current?.abort();
    running.current = null;
  }, []);
  useEffect(() => stop, [stop]);

  const follow = useCallback(
    async (begin: (signal: AbortSignal) => Promise<Analysis>) => {
      stop();
      const controller = new AbortController();
      running.current = controller;
      const { signal } = controller;
      try {
        let analysis = await begin(signal);
        while (analysis.state === 'working') {
          setKept({ state: 'working', analysis });
          await pause(POLL_MS, signal);
          ({ analysis } = await call(endpoints.getAnalysis, { params: { id: analysis.id }, signal }));
        }
        setKept(analysis.state === 'cancelled' ? { state: 'idle' } : { state: 'ended', analysis });
      } catch (error) {
        if (signal.aborted) return;
        const message = error instanceof Error ? error.message : 'The server could not be asked.';
        setKept({ state: 'refused', refusal: { kind: 'other', message } });
      }
    },
    [stop],
  );

  useEffect(() => {
    if (open) void follow(async () => open);
  }, [open, follow]);

  const start = useCallback(
    (seconds: number) => {
      setKept({ state: 'working', analysis: null });
      void follow(async (signal) => {
        const body = { question, seconds };
        return (await call(endpoints.startAnalysis, { params: { id: codeId }, body, signal })).analysis;
      });
    },
    [codeId, question, follow],
  );

  const cancel = useCallback(async () => {
    const id = kept.state === 'working' ? kept.analysis?.id : undefined;
    stop();
    setKept({ state: 'idle' });
    if (id) await call(endpoints.cancelAnalysis, { params: { id } }).catch(() => undefined);
  }, [kept, stop]);

  return { kept, start, cancel };
}
