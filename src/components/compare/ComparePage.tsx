import { useMemo, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import type { Measurement } from '@/api/measurements.ts';
import type { Point, Run } from '@/api/runs.ts';
import { groupPoints } from '@/client/curves/group-points.ts';
import { measuredCurves } from '@/client/curves/measured-curves.ts';
import { useApi } from '@/client/hooks.ts';
import { useStrataEvidence } from '@/client/strata/use-strata-evidence.ts';
import { Button, ButtonLink } from '@/components/ui/Button.tsx';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';
import { CompareBench } from './CompareBench.tsx';
import { RemoveMeasured } from './RemoveMeasured.tsx';

interface Props {
  projectId: string;
  canRun: boolean;
}

/** Overlays the project's measured curves, from whatever runs they come. */
export function ComparePage({ projectId, canRun }: Props) {
  const params = { id: projectId };
  const runs = useApi(endpoints.listRuns, { params, query: { limit: 500 } });
  const points = useApi(endpoints.projectPoints, { params });
  const measured = useApi(endpoints.listMeasurements, { params });
  const requirements = useApi(endpoints.getRequirements, { params });
  const error = runs.error ?? points.error ?? measured.error;
  const [leaving, setLeaving] = useState<Measurement | null>(null);
  if (runs.data && points.data && measured.data) {
    const { measurements } = measured.data;
    const shown = {
      runs: runs.data.runs,
      points: points.data.points,
      measurements,
      addAddress: canRun ? paths.newMeasurement(projectId) : null,
      onRemove: canRun ? setLeaving : null,
    };
    if (shown.points.length === 0 && measurements.length === 0)
      return <NothingMeasured projectId={projectId} canRun={canRun} />;
    return (
      <>
        <Compared {...shown} requirements={requirements.data?.requirements ?? null} />
        <RemoveMeasured
          measured={leaving}
          onClose={() => setLeaving(null)}
          onRemoved={() => {
            setLeaving(null);
            void measured.mutate();
          }}
        />
      </>
    );
  }
  if (!error) return <p className="text-quiet">The measured points are being fetched.</p>;
  const again = () => Promise.all([runs.mutate(), points.mutate()]);
  return (
    <Notice kind="fail" word="The points could not be fetched" live action={<Button onClick={again}>Try again</Button>}>
      {error.message}
    </Notice>
  );
}

type ComparedProps = Omit<Parameters<typeof CompareBench>[0], 'curves'> & {
  runs: Run[];
  points: Point[];
};

function Compared({ points, ...shown }: ComparedProps) {
  const { measurements } = shown;
  const evidence = useStrataEvidence(points);
  const curves = useMemo(() => {
    const computed = [...groupPoints(points), ...evidence.map(({ curve }) => curve)];
    return [...computed.filter((curve) => curve.points.length > 0), ...measuredCurves(measurements)];
  }, [points, evidence, measurements]);
  return <CompareBench {...shown} curves={curves} />;
}

function NothingMeasured({ projectId, canRun }: Props) {
  const action = canRun && (
    <span className="flex flex-wrap gap-3">
      <ButtonLink kind="primary" href={paths.newRun(projectId)}>
        State a run
      </ButtonLink>
      <ButtonLink href={paths.newMeasurement(projectId)}>Add measured data</ButtonLink>
    </span>
  );
  return (
    <EmptyState title="Nothing measured yet" action={action}>
      Curves can be compared as soon as a run has its first frames.
    </EmptyState>
  );
}
