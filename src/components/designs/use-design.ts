import { useCallback, useEffect, useRef, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import type { DesignDesk } from '@/client/analyse-pool.ts';
import { type Refusal, refusalFrom, refusalOf } from '@/components/codes/refusal.ts';
import type { OpenedDesign, OpenStep } from '@/core/designs/open-design.ts';
import { sourceOf } from './design-source.ts';

export type DesignCode = Pick<Code, 'id' | 'fingerprint' | 'design' | 'derivation'>;

export type DesignState =
  | { state: 'idle' }
  | { state: 'working'; step: OpenStep | null }
  | { state: 'open'; opened: OpenedDesign; desk: DesignDesk; elapsedMs: number }
  | { state: 'refused'; refusal: Refusal };

/** Builds a kept code's design in a worker; cancelling ends the worker at once. */
export function useDesign(code: DesignCode) {
  const [design, setDesign] = useState<DesignState>({ state: 'idle' });
  const running = useRef<AbortController | null>(null);
  const desk = useRef<DesignDesk | null>(null);

  const cancel = useCallback(() => {
    running.current?.abort();
    running.current = null;
    setDesign({ state: 'idle' });
  }, []);

  const start = useCallback(async () => {
    running.current?.abort();
    const controller = new AbortController();
    running.current = controller;
    const still = () => running.current === controller;
    setDesign({ state: 'working', step: null });
    try {
      const { openDesignDesk } = await import('@/client/analyse-pool.ts');
      desk.current ??= openDesignDesk(code.id);
      const source = await sourceOf(code);
      const { value, elapsedMs } = await desk.current.open(source, {
        signal: controller.signal,
        onStep: (step) => still() && setDesign({ state: 'working', step }),
      });
      // A step can be told after the result, on a channel of its own; nothing counts once the design is open.
      if (!still()) return;
      running.current = null;
      setDesign({ state: 'open', opened: value, desk: desk.current, elapsedMs });
    } catch (error) {
      if (!still()) return;
      running.current = null;
      setDesign({ state: 'refused', refusal: refusalIn(error) });
    }
  }, [code]);

  useEffect(
    () => () => {
      running.current?.abort();
      desk.current?.close();
      desk.current = null;
    },
    [],
  );
  return { design, start, cancel };
}

/** An engine's refusal, whether it was thrown here or carried over from a worker. */
export function refusalIn(error: unknown): Refusal {
  if (error instanceof Error && 'failure' in error) {
    const { code, message, data } = error.failure as { code: string; message: string; data: object };
    return refusalFrom(code, message, data);
  }
  return refusalOf(error);
}
