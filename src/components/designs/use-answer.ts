import { useCallback, useEffect, useRef, useState } from 'react';
import type { DesignDesk } from '@/client/analyse-pool.ts';
import type { Refusal } from '@/components/codes/refusal.ts';
import type { OpenedDesign } from '@/core/designs/open-design.ts';
import type { AnswerTo, QuestionId } from '@/core/designs/questions/index.ts';
import { refusalIn } from './use-design.ts';

export type AnswerState<A> =
  | { state: 'unasked' }
  | { state: 'working'; share: number | null; elapsedMs: number }
  | { state: 'answered'; answer: A; elapsedMs: number }
  | { state: 'refused'; refusal: Refusal; elapsedMs: number };

export interface Search {
  seed?: string;
  limit?: number;
}

const TICK_MS = 250;

/** One question to an open design: asked, watched, cancelled, answered. Time is told while it works and after. */
export function useAnswer<Q extends QuestionId>(desk: DesignDesk, opened: OpenedDesign, question: Q) {
  const [answer, setAnswer] = useState<AnswerState<AnswerTo<Q>>>({ state: 'unasked' });
  const running = useRef<AbortController | null>(null);
  const stop = useCallback(() => {
    running.current?.abort();
    running.current = null;
  }, []);

  const ask = useCallback(
    async (search: Search = {}) => {
      stop();
      const controller = new AbortController();
      running.current = controller;
      const still = () => running.current === controller;
      const from = performance.now();
      const tell = (share: number | null) =>
        setAnswer((before) => ({
          state: 'working',
          share: share ?? (before.state === 'working' ? before.share : null),
          elapsedMs: performance.now() - from,
        }));
      tell(null);
      const ticking = setInterval(() => still() && tell(null), TICK_MS);
      const settle = (outcome: AnswerState<AnswerTo<Q>>) => {
        if (!still()) return;
        running.current = null;
        setAnswer(outcome);
      };
      try {
        const { value, elapsedMs } = await desk.ask(opened, question, {
          ...search,
          signal: controller.signal,
          onProgress: (share) => still() && tell(share),
        });
        settle({ state: 'answered', answer: value, elapsedMs });
      } catch (error) {
        settle({ state: 'refused', refusal: refusalIn(error), elapsedMs: performance.now() - from });
      } finally {
        clearInterval(ticking);
      }
    },
    [desk, opened, question, stop],
  );

  const cancel = useCallback(() => {
    stop();
    setAnswer({ state: 'unasked' });
  }, [stop]);

  useEffect(() => stop, [stop]);
  return { answer, ask, cancel };
}
