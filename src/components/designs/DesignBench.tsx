import { lazy, Suspense, useEffect } from 'react';
import type { Code } from '@/api/codes.ts';
import { RefusalNotice } from '@/components/codes/RefusalNotice.tsx';
import { Button } from '@/components/ui/Button.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import type { OpenStep } from '@/core/designs/open-design.ts';
import { type DesignCode, type DesignState, useDesign } from './use-design.ts';

const DesignSheet = lazy(() => import('./DesignSheet.tsx').then((module) => ({ default: module.DesignSheet })));

interface Props {
  code: DesignCode;
  /** Kept with the code when it was built; null for an uploaded matrix. */
  certificate: Code['certificate'];
}

/** Larger designs are built only when asked for: a phone should not spend its memory on a link. */
const MOST_INCIDENCES_AT_ONCE = 2_000_000;

/** The design that a kept code came from, its blocks built anew in this browser. */
export default function DesignBench({ code, certificate }: Props) {
  const { design, start, cancel } = useDesign(code);
  const incidences = certificate ? certificate.b * certificate.k : 0;
  const atOnce = incidences <= MOST_INCIDENCES_AT_ONCE;
  useEffect(() => {
    if (atOnce) void start();
  }, [atOnce, start]);
  if (design.state === 'open') {
    return (
      <Suspense fallback={<p className="text-quiet">Drawing …</p>}>
        <DesignSheet {...design} kept={certificate} />
      </Suspense>
    );
  }
  return <Opening design={design} incidences={incidences} onStart={start} onCancel={cancel} />;
}

const steps: Record<OpenStep, { at: number; text: string }> = {
  build: { at: 0.2, text: 'building the blocks' },
  verify: { at: 0.6, text: 'verifying: counting how often points meet' },
};

interface OpeningProps {
  design: Exclude<DesignState, { state: 'open' }>;
  incidences: number;
  onStart(): void;
  onCancel(): void;
}

function Opening({ design, incidences, onStart, onCancel }: OpeningProps) {
  if (design.state === 'working') {
    const step = design.step && steps[design.step];
    return (
      <div className="grid max-w-md gap-3">
        <Progress label="Building the design" value={step?.at ?? null} left={step?.text ?? 'starting a worker'} />
        <Button onClick={onCancel}>Cancel</Button>
      </div>
    );
  }
  const size = incidences > 0 ? ` It holds ${counted(incidences, 'incidence')}.` : '';
  return (
    <div className="grid max-w-prose justify-items-start gap-3">
      {design.state === 'refused' && <RefusalNotice refusal={design.refusal} />}
      <p className="text-quiet">The blocks are built and verified in this browser when asked for.{size}</p>
      <Button kind="primary" onClick={onStart}>
        {design.state === 'refused' ? 'Try again' : 'Build the blocks'}
      </Button>
    </div>
  );
}
