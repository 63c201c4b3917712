import { useCallback, useEffect, useRef, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import type { AnalysableCode } from '@/core/codes/analyse-ldpc.ts';
import type { CodeAnswer } from '@/core/codes/questions/question.ts';
import type { CodeQuestionId } from '@/core/codes/questions/question-ids.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { type Refusal, refusalFrom, refusalOf } from '../refusal.ts';

export type Examined = Pick<Code, 'id' | 'fingerprint' | 'design' | 'derivation'>;

export type Examination =
  | { state: 'unasked' }
  | { state: 'working'; share: number | null; elapsedMs: number }
  | { state: 'answered'; answer: CodeAnswer; elapsedMs: number; seconds: number }
  | { state: 'refused'; refusal: Refusal };

const TICK_MS = 250;

/** One question to a kept code: asked in a worker, watched, cancelled, answered. */
export function useExamination(code: Examined, question: CodeQuestionId) {
  const [examination, setExamination] = useState<Examination>({ state: 'unasked' });
  const running = useRef<AbortController | null>(null);
  useEffect(() => () => running.current?.abort(), []);

  const ask = useCallback(
    async (seconds: number) => {
      running.current?.abort();
      const controller = new AbortController();
      running.current = controller;
      const still = () => running.current === controller;
      const from = performance.now();
      let share: number | null = null;
      const tell = () => still() && setExamination({ state: 'working', share, elapsedMs: performance.now() - from });
      tell();
      const ticking = setInterval(tell, TICK_MS);
      const settle = (outcome: Examination) => {
        clearInterval(ticking);
        if (!still()) return;
        running.current = null;
        setExamination(outcome);
      };
      try {
        const [{ matrixOf }, { examineCode }] = await Promise.all([
          import('@/client/code-matrix.ts'),
          import('@/client/examine-pool.ts'),
        ]);
        const H = await matrixOf(code);
        const answer = await examineCode(question, analysable(code, H), {
          seconds,
          signal: controller.signal,
          onProgress: (done) => {
            share = done;
          },
        });
        if (answer.ok) settle({ state: 'answered', answer: answer.answer, elapsedMs: answer.elapsedMs, seconds });
        else
          settle({
            state: 'refused',
            refusal: refusalFrom(answer.failure.code, answer.failure.message, answer.failure.data),
          });
      } catch (error) {
        settle({ state: 'refused', refusal: refusalOf(error) });
      }
    },
    [code, question],
  );

  const cancel = useCallback(() => {
    running.current?.abort();
    running.current = null;
    setExamination({ state: 'unasked' });
  }, []);

  return { examination, ask, cancel };
}

/** The matrix with where it came from, as far as that lets theorems speak. */
function analysable({ design, derivation }: Examined, H: AnalysableCode['H']): AnalysableCode {
  if (derivation.kind !== 'ldpc' || design.family === 'uploaded') return { H };
  return { H, design: design as DesignSpec, checks: derivation.checks, transforms: derivation.transforms ?? [] };
}
