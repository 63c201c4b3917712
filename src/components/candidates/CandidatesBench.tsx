import { useEffect, useRef } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { useApi } from '@/client/hooks.ts';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { CandidatePanel } from './CandidatePanel.tsx';
import { CandidateTable } from './CandidateTable.tsx';
import { FeasibilityForm } from './FeasibilityForm.tsx';
import { FilterForm } from './FilterForm.tsx';
import { queryFrom } from './filters.ts';
import { filtersFrom } from './from-requirements.ts';
import { NearestList } from './NearestList.tsx';
import { RateScatter } from './RateScatter.tsx';
import { type Candidates, useCandidates } from './use-candidates.ts';
import { useChosen } from './use-chosen.ts';
import { type FilterState, useFilters } from './use-filters.ts';
import { WindowNote } from './WindowNote.tsx';

interface Props {
  projectId: string;
  mayKeep: boolean;
}

/** The catalogue: every parameter set of every family inside the window, from closed formulas, without building any. On a
 *  first visit the window is the one that the project's requirements ask for. */
export function CandidatesBench({ projectId, mayKeep }: Props) {
  const state = useFilters();
  const stored = useApi(endpoints.getRequirements, { params: { id: projectId } });
  const requirements = stored.data?.requirements ?? null;
  const { isBare, replace } = state;
  useEffect(() => {
    if (isBare && requirements) replace(filtersFrom(requirements));
  }, [isBare, requirements, replace]);
  const isSettled = !isBare || stored.error !== undefined || stored.data?.requirements === null;
  const { query, errors } = queryFrom(state.filters);
  const asked = isSettled ? query : null;
  const candidates = useCandidates(asked);
  const chosen = useChosen(state.chosen, candidates.rows, asked);
  const panel = useRef<HTMLElement>(null);
  // Where the panel stands beneath the table it would stay out of sight.
  const showPanel = () =>
    requestAnimationFrame(() => {
      const below = window.matchMedia('(width < 75rem)').matches;
      if (below) panel.current?.scrollIntoView({ block: 'start', behavior: 'smooth' });
    });

  return (
    <div className="grid items-start gap-x-6 gap-y-5 wide:grid-cols-[minmax(0,1fr)_22rem]">
      <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5" id="candidates">
        <div>
          <h1>Constructions that could meet it</h1>
          <p className="text-quiet" role="status">
            {howMany(candidates)}
          </p>
        </div>
        <div className="grid gap-3">
          <FilterForm state={state} errors={errors} />
          {stored.data && <WindowNote state={state} requirements={requirements} projectId={projectId} />}
        </div>
        {candidates.failure && (
          <Notice kind="fail" word="Not searched" live>
            {candidates.failure.message}
          </Notice>
        )}
        {candidates.matching === 0 ? (
          <NearestList nearest={candidates.nearest} obstacles={candidates.obstacles} />
        ) : (
          asked && (
            <>
              <RateScatter query={asked} chosen={chosen} state={state} />
              <CandidateTable
                rows={candidates.rows}
                matching={candidates.matching ?? 0}
                state={state}
                more={candidates.more}
                onOpen={showPanel}
              />
            </>
          )
        )}
      </div>
      <aside
        ref={panel}
        className="grid min-w-0 scroll-mt-4 content-start gap-6 wide:sticky wide:top-4 wide:max-h-[calc(100dvh-2rem)] wide:overflow-y-auto"
        aria-label="Chosen candidate"
      >
        <Chosen state={state} chosen={chosen} projectId={projectId} mayKeep={mayKeep} />
        <FeasibilityForm />
      </aside>
    </div>
  );
}

function howMany({ matching, total }: Candidates): string {
  if (matching === null || total === null) return 'From closed formulas, nothing built yet. Searching …';
  return `From closed formulas, nothing built yet. ${wholeNumber(matching)} of ${wholeNumber(total)} parameter sets pass the window.`;
}

interface ChosenProps extends Props {
  state: FilterState;
  chosen: ReturnType<typeof useChosen>;
}

function Chosen({ state, chosen, projectId, mayKeep }: ChosenProps) {
  if (chosen) {
    return (
      <div className="grid gap-3">
        <CandidatePanel key={chosen.id} projectId={projectId} row={chosen} mayKeep={mayKeep} />
        <Button
          kind="quiet"
          className="wide:hidden"
          onClick={() => document.getElementById('candidates')?.scrollIntoView({ block: 'end', behavior: 'smooth' })}
        >
          Back to the candidates
        </Button>
      </div>
    );
  }
  if (state.chosen && chosen === null) {
    return (
      <Notice kind="caution" word="Outside" live>
        The candidate that was chosen does not lie in this window.
      </Notice>
    );
  }
  return (
    <p className="border border-rule border-dashed p-4 text-quiet">
      Choose a row to see its numbers and their sources.
    </p>
  );
}
