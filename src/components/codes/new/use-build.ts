import type { BuildRequest, BuiltCode } from '@workers/build/api.ts';
import { startTransition, useCallback, useEffect, useRef, useState } from 'react';
import type { NewCode } from '@/api/codes.ts';
import type { SheetStep } from '@/core/codes/sheet.ts';
import { type Refusal, refusalFrom, refusalOf } from '../refusal.ts';

/** What the server would be asked to keep. */
export type Keepable = Pick<NewCode, 'design' | 'derivation'>;

export interface BuildPlan {
  keep: Keepable;
  /** What the worker is given: the same for a construction, the matrix itself where that is where the steps begin. */
  work(): BuildRequest | Promise<BuildRequest>;
}

export type BuildState =
  | { state: 'idle' }
  | { state: 'working'; step: SheetStep | null }
  | { state: 'built'; built: BuiltCode; request: Keepable; elapsedMs: number }
  | { state: 'refused'; refusal: Refusal };

/** Builds in a worker, one build at a time; leaving the page or choosing something else cancels it. */
export function useBuild() {
  const [build, setBuild] = useState<BuildState>({ state: 'idle' });
  const running = useRef<AbortController | null>(null);

  const cancel = useCallback(() => {
    running.current?.abort();
    running.current = null;
    setBuild({ state: 'idle' });
  }, []);

  const start = useCallback(async ({ keep, work }: BuildPlan) => {
    running.current?.abort();
    const controller = new AbortController();
    running.current = controller;
    setBuild({ state: 'working', step: null });
    const from = performance.now();
    const still = () => running.current === controller;
    // A step can be told after the result, on a channel of its own; nothing counts once the build has ended.
    const end = (outcome: BuildState) => {
      if (!still()) return;
      running.current = null;
      // A long listing is drawn in slices, so that the page answers meanwhile.
      startTransition(() => setBuild(outcome));
    };
    try {
      const { buildCodeInWorker } = await import('@/client/build-pool.ts');
      const built = await buildCodeInWorker(await work(), {
        signal: controller.signal,
        onProgress: (step) => still() && setBuild({ state: 'working', step }),
      });
      end({ state: 'built', built, request: keep, elapsedMs: performance.now() - from });
    } catch (error) {
      end({ state: 'refused', refusal: refusalOfBuild(error) });
    }
  }, []);

  useEffect(() => () => running.current?.abort(), []);
  return { build, start, cancel };
}

function refusalOfBuild(error: unknown): Refusal {
  if (error instanceof Error && 'failure' in error) {
    const { code, message, data } = error.failure as { code: string; message: string; data: object };
    return refusalFrom(code, message, data);
  }
  return refusalOf(error);
}
