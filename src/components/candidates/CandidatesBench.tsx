import { endpoints } from '@/api/endpoints.ts';
import { useApi } from '@/client/hooks.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { CandidatePanel } from './CandidatePanel.tsx';
import { CandidateTable } from './CandidateTable.tsx';
import { FeasibilityForm } from './FeasibilityForm.tsx';
import { FilterForm } from './FilterForm.tsx';
import { queryFrom } from './filters.ts';
import { NearestList } from './NearestList.tsx';
import { RateScatter } from './RateScatter.tsx';
import { useCandidates } from './use-candidates.ts';
import { useFilters } from './use-filters.ts';

/** The catalogue: every parameter set of every family inside the window, from closed formulas, without building any. */
export function CandidatesBench({ projectId, mayKeep }: { projectId: string; mayKeep: boolean }) {
  const state = useFilters();
  const { query, errors } = queryFrom(state.filters);
  const requirements = useApi(endpoints.getRequirements, { params: { id: projectId } });
  const candidates = useCandidates(query);
  const { rows, matching, total, failure, nearest } = candidates;
  const chosen = rows.find(({ id }) => id === state.chosen);
  return (
    <div className="grid items-start gap-x-6 gap-y-5 wide:grid-cols-[minmax(0,1fr)_22rem]">
      <div className="grid min-w-0 gap-5">
        <div>
          <h1>Constructions that could meet it</h1>
          <p className="text-quiet" role="status">
            From closed formulas, nothing built yet.{' '}
            {matching === null || total === null
              ? 'Searching …'
              : `${wholeNumber(matching)} of ${wholeNumber(total)} parameter sets pass the window.`}
          </p>
        </div>
        <FilterForm state={state} errors={errors} requirements={requirements.data?.requirements ?? null} />
        {failure && (
          <Notice kind="fail" word="Not searched" live>
            {failure.message}
          </Notice>
        )}
        {matching === 0 ? (
          <NearestList nearest={nearest} obstacles={candidates.obstacles} />
        ) : (
          <>
            <RateScatter rows={rows} state={state} />
            <CandidateTable rows={rows} matching={matching ?? 0} state={state} more={candidates.more} />
          </>
        )}
      </div>
      <aside className="grid content-start gap-6" aria-label="Chosen candidate">
        {chosen ? (
          <CandidatePanel key={chosen.id} projectId={projectId} row={chosen} mayKeep={mayKeep} />
        ) : (
          <p className="border border-rule border-dashed p-4 text-quiet">
            Choose a row to see its numbers and their sources.
          </p>
        )}
        <FeasibilityForm />
      </aside>
    </div>
  );
}
