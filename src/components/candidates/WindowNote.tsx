import type { Requirements } from '@/api/projects.ts';
import { Button } from '@/components/ui/Button.tsx';
import { paths } from '@/paths.ts';
import { windowNames } from './filters.ts';
import { filtersFrom, isFromRequirements, leftOut } from './from-requirements.ts';
import type { FilterState } from './use-filters.ts';

interface Props {
  state: FilterState;
  /** Null when none are stated. */
  requirements: Requirements | null;
  projectId: string;
}

/** Says where the window comes from: the requirements, or the reader; and takes it back to either. */
export function WindowNote({ state, requirements, projectId }: Props) {
  const { filters, replace } = state;
  const isOpen = windowNames.every((name) => !filters[name]);
  if (!requirements) {
    return (
      <p className="flex flex-wrap items-baseline gap-x-4 gap-y-1 text-quiet text-tiny">
        <span>
          The project has{' '}
          <a className="link" href={paths.requirements(projectId)}>
            no requirements
          </a>{' '}
          to take a window from.
        </span>
        {!isOpen && <Clear onClick={() => replace({})} />}
      </p>
    );
  }
  const isTheirs = isFromRequirements(filters, requirements);
  const missing = leftOut(requirements);
  return (
    <p className="flex flex-wrap items-baseline gap-x-4 gap-y-1 text-quiet text-tiny">
      {isTheirs ? (
        <span>
          <span className="font-semibold text-ink">From requirements.</span>
          {missing.length > 0 && ` Not part of the window: ${missing.join('; ')}.`}
        </span>
      ) : (
        <>
          <span>
            {isOpen ? 'The window is open: every construction.' : 'Not the window that the requirements ask for.'}
          </span>
          <Button size="small" onClick={() => replace(filtersFrom(requirements))}>
            Take from requirements
          </Button>
        </>
      )}
      {!isOpen && <Clear onClick={() => replace({})} />}
    </p>
  );
}

function Clear({ onClick }: { onClick(): void }) {
  return (
    <Button kind="quiet" size="small" onClick={onClick}>
      Clear
    </Button>
  );
}
