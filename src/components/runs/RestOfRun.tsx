import { useState } from 'react';
import type { Run } from '@/api/runs.ts';
import { useRunPatch } from '@/client/use-run-patch.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { ExtendDialog } from './ExtendDialog.tsx';
import { PlaceField } from './PlaceField.tsx';

/** Where the rest of a run is computed, and how much of it there is to be. */
export function RestOfRun({ run }: { run: Run }) {
  const { patch, isBusy, failure } = useRunPatch(run.id);
  const [asksToExtend, setAsksToExtend] = useState(false);
  const isOver = run.state === 'finished' || run.state === 'stopped';
  const canExtend = run.state !== 'stopped' && run.goal?.kind !== 'limit';
  return (
    <section aria-label="The rest of the run" className="grid gap-3" data-screen-only>
      {!isOver && (
        <PlaceField
          label="The rest is computed"
          value={run.place}
          disabled={isBusy}
          onChange={(place) => void patch({ place })}
        />
      )}
      {canExtend && (
        <div>
          <Button size="small" onClick={() => setAsksToExtend(true)}>
            Extend
          </Button>
        </div>
      )}
      {failure && !asksToExtend && (
        <Notice kind="fail" word="Refused" live>
          {failure.message}
        </Notice>
      )}
      {asksToExtend && (
        <ExtendDialog
          run={run}
          isBusy={isBusy}
          failure={failure}
          onClose={() => setAsksToExtend(false)}
          onExtend={async (extend) => {
            if (await patch({ extend })) setAsksToExtend(false);
          }}
        />
      )}
    </section>
  );
}
