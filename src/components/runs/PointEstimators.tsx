import { endpoints } from '@/api/endpoints.ts';
import type { Point } from '@/api/runs.ts';
import { useApi } from '@/client/hooks.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import { Figure } from '../charts/Figure.tsx';
import { estimatorRows } from './estimator-rows.ts';

interface Props {
  point: Point;
}

/** What a point's counts say, each by the estimator that suits it. */
export function PointEstimators({ point }: Props) {
  const { data } = useApi(endpoints.getCode, { params: { id: point.codeId } });
  const rows = estimatorRows(point, data?.code.ones ?? null).map(
    (row): TitleRow => ({ label: row.label, value: <Figure text={row.text} />, grade: row.grade, note: row.note }),
  );
  return <TitleBlock title="Estimates at this point" rows={rows} />;
}
