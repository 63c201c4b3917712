import { Button } from '@/components/ui/Button.tsx';
import { NumberField, TextField } from '@/components/ui/fields.tsx';
import type { FieldErrors } from './run-accepted.ts';
import type { RunDraft } from './run-draft.ts';
import { freshSeed } from './run-proposals.ts';

interface Props {
  draft: RunDraft;
  errors: FieldErrors;
  onChange: (change: Partial<RunDraft>) => void;
}

/** When a point ends, how the work is cut, and from which seed the frames are drawn. */
export function StoppingFields({ draft, errors, onChange }: Props) {
  return (
    <div className="grid gap-4">
      <div className="grid gap-4 sm:grid-cols-3">
        {draft.points !== 'strata' && <StopFields draft={draft} errors={errors} onChange={onChange} />}
        <NumberField
          label="Frames per shard"
          value={draft.framesPerShard}
          error={errors.framesPerShard}
          hint="a shard is the piece that is handed in at once"
          onChange={(event) => onChange({ framesPerShard: event.target.value })}
        />
        <NumberField
          label="Seconds of work, at most"
          value={draft.seconds}
          error={errors.seconds}
          hint="of the whole run; empty: as long as it takes"
          onChange={(event) => onChange({ seconds: event.target.value })}
        />
      </div>
      <div className="flex flex-wrap items-start gap-3">
        <TextField
          label="Seed"
          className="min-w-60 grow"
          value={draft.seed}
          error={errors.seed}
          hint="any text; the same seed gives the same frames everywhere"
          autoComplete="off"
          spellCheck={false}
          onChange={(event) => onChange({ seed: event.target.value })}
        />
        <Button size="small" className="mt-6" onClick={() => onChange({ seed: freshSeed() })}>
          Another seed
        </Button>
      </div>
    </div>
  );
}

/** When a point of a sweep ends; the planner of a limit sets the frames of its points itself, up to the cap. */
function StopFields({ draft, errors, onChange }: Props) {
  const isLimit = draft.points === 'limit';
  return (
    <>
      {!isLimit && (
        <NumberField
          label="A point ends at frame errors"
          value={draft.frameErrors}
          error={errors.frameErrors}
          hint="100 gives about 10 % standard error; empty: at its frames alone"
          onChange={(event) => onChange({ frameErrors: event.target.value })}
        />
      )}
      <NumberField
        label={isLimit ? 'Frames in all, at most' : 'or at frames'}
        value={draft.maxFrames}
        error={errors.maxFrames}
        hint={isLimit ? 'over every number of errors and stage' : 'the cap for each point; 1e8 is understood'}
        onChange={(event) => onChange({ maxFrames: event.target.value })}
      />
    </>
  );
}
