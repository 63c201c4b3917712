import { useEffect, useRef, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Point } from '@/api/runs.ts';
import { call } from './api.ts';

const pageSize = 100;

/** The first points of a run of very many, fetched page by page as more are asked for. */
export function usePagedPoints(runId: string, isWanted: boolean, wanted: number) {
  const [points, setPoints] = useState<readonly Point[]>([]);
  const [failure, setFailure] = useState<string | null>(null);
  const [isBusy, setIsBusy] = useState(false);
  const isOver = useRef(false);
  const isShort = isWanted && points.length < wanted && !isOver.current;

  useEffect(() => {
    if (!isShort) return;
    const controller = new AbortController();
    const after = points.at(-1)?.id;
    const query = { limit: pageSize, ...(after !== undefined && { after }) };
    setIsBusy(true);
    setFailure(null);
    call(endpoints.runPoints, { params: { id: runId }, query, signal: controller.signal })
      .then((page) => {
        isOver.current = page.next === undefined;
        setPoints((known) => [...known, ...page.points]);
      })
      .catch((error: Error) => !controller.signal.aborted && setFailure(error.message))
      .finally(() => setIsBusy(false));
    return () => controller.abort();
  }, [runId, isShort, points]);

  return { points, failure, isBusy };
}
