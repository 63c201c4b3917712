import { useMemo } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Point, Run } from '@/api/runs.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { useApi } from '@/client/hooks.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';
import { CompareBench } from './CompareBench.tsx';

interface Props {
  projectId: string;
  canRun: boolean;
}

/** Overlays the project's measured curves, from whatever runs they come. */
export function ComparePage({ projectId, canRun }: Props) {
  const params = { id: projectId };
  const runs = useApi(endpoints.listRuns, { params, query: { limit: 500 } });
  const points = useApi(endpoints.projectPoints, { params });
  const requirements = useApi(endpoints.getRequirements, { params });
  const error = runs.error ?? points.error;
  if (runs.data && points.data) {
    const shown = { projectId, runs: runs.data.runs, points: points.data.points };
    if (shown.points.length === 0) return <NothingMeasured projectId={projectId} canRun={canRun} />;
    return <Compared {...shown} requirements={requirements.data?.requirements ?? null} />;
  }
  if (!error) return <p className="text-quiet">The measured points are being fetched.</p>;
  const again = () => Promise.all([runs.mutate(), points.mutate()]);
  return (
    <Notice kind="fail" word="The points could not be fetched" live action={<Button onClick={again}>Try again</Button>}>
      {error.message}
    </Notice>
  );
}

interface ComparedProps {
  runs: Run[];
  points: Point[];
  requirements: Parameters<typeof CompareBench>[0]['requirements'];
}

function Compared({ runs, points, requirements }: ComparedProps) {
  const curves = useMemo(() => groupPoints(points).filter((curve) => curve.points.length > 0), [points]);
  return <CompareBench runs={runs} curves={curves} requirements={requirements} />;
}

function NothingMeasured({ projectId, canRun }: Props) {
  const action = canRun && (
    <ButtonLink kind="primary" href={paths.newRun(projectId)}>
      State a run
    </ButtonLink>
  );
  return (
    <EmptyState title="Nothing measured yet" action={action}>
      Curves can be compared as soon as a run has its first frames.
    </EmptyState>
  );
}
