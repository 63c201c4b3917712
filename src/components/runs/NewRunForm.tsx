import { type ReactNode, useRef } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { useApi } from '@/client/hooks.ts';
import { Button } from '@/components/ui/Button.tsx';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { WeightFields } from '../strata/WeightFields.tsx';
import { CodeChoice } from './CodeChoice.tsx';
import { DecoderFields } from './DecoderFields.tsx';
import { CurveGoalFields, LimitGoalFields } from './GoalFields.tsx';
import { PartError } from './PartError.tsx';
import { PlaceField } from './PlaceField.tsx';
import type { FieldErrors } from './run-accepted.ts';
import { type Judged, OFFERED_DECODERS, type RunDraft } from './run-draft.ts';
import { StoppingFields } from './StoppingFields.tsx';
import { SweepFields } from './SweepFields.tsx';
import { useRunDraft } from './use-run-draft.ts';
import { useRunSubmission } from './use-run-submission.ts';

interface Props {
  projectId: string;
}

/** States a run: codes × decoders × channel points or weights, seed and stopping rule. */
export function NewRunForm({ projectId }: Props) {
  const codes = useApi(endpoints.listCodes, { params: { id: projectId }, query: { limit: 500 } });
  const requirements = useApi(endpoints.getRequirements, { params: { id: projectId } });
  const { draft, chosen, name, judged, change } = useRunDraft(codes.data?.codes, requirements.data?.requirements);
  const form = useRef<HTMLFormElement>(null);
  const areStrata = draft.points === 'strata' || draft.points === 'limit';
  const { errors, refusal, isBusy, onSubmit } = useRunSubmission(
    projectId,
    judged,
    form,
    areStrata ? draft.targetP : null,
  );

  return (
    <form ref={form} onSubmit={onSubmit} noValidate className="grid max-w-3xl gap-7" aria-label="New run">
      <Part title="Codes">
        {codes.data ? (
          <CodeChoice
            projectId={projectId}
            codes={codes.data.codes}
            chosen={draft.codeIds}
            error={errors.codeIds}
            onChange={(codeIds) => change({ codeIds })}
          />
        ) : (
          <p className="text-quiet">{codes.error?.message ?? 'The codes are being fetched.'}</p>
        )}
      </Part>
      <Part title="Decoders" error={errors.decoders}>
        {OFFERED_DECODERS.map((kind) => (
          <DecoderFields
            key={kind}
            kind={kind}
            draft={draft.decoders[kind]}
            errors={errors}
            codes={chosen}
            trialP={areStrata ? draft.targetP : draft.from}
            areStrata={areStrata}
            onChange={(part) =>
              change({ decoders: { ...draft.decoders, [kind]: { ...draft.decoders[kind], ...part } } })
            }
          />
        ))}
      </Part>
      <Part title="Channel: binary symmetric">
        <ChoiceGroup
          legend="Points"
          className="mb-3"
          value={draft.points}
          onChange={(points) => change({ points })}
          choices={[
            { value: 'sweep', label: 'Sweep of p', note: 'frames as the channel sends them' },
            { value: 'curve', label: 'Planned curve', note: 'points placed as results come in' },
            { value: 'strata', label: 'Weight strata', note: 'by number of errors: the whole curve, rigorous limits' },
            { value: 'limit', label: 'Show a limit', note: 'such as UBER ≤ 1e-15 at one p' },
          ]}
        />
        <PointFields draft={draft} errors={errors} judged={judged} onChange={change} />
      </Part>
      <Part title="Stopping, shards and seed">
        <StoppingFields draft={draft} errors={errors} onChange={change} />
      </Part>
      <Part title="Place">
        <div className="max-w-md">
          <PlaceField
            label="Computed"
            value={draft.place}
            error={errors.place}
            onChange={(place) => change({ place })}
          />
        </div>
      </Part>
      <Part title="Name">
        <TextField
          label="Name of the run"
          value={draft.name}
          placeholder={name}
          error={errors.name}
          hint="left empty, the name shown is taken"
          onChange={(event) => change({ name: event.target.value })}
        />
      </Part>
      {refusal && (
        <Notice kind="fail" word="Refused" live>
          {refusal} Nothing was stored.
        </Notice>
      )}
      <div className="flex flex-wrap items-center gap-x-5 gap-y-2 border-ink border-t pt-4">
        <Button kind="primary" type="submit" busy={isBusy}>
          State the run
        </Button>
        <p className="text-quiet">{countText(judged, draft)}</p>
      </div>
    </form>
  );
}

interface PointProps {
  draft: RunDraft;
  errors: FieldErrors;
  judged: Judged;
  onChange: (change: Partial<RunDraft>) => void;
}

function PointFields({ draft, errors, judged, onChange }: PointProps) {
  switch (draft.points) {
    case 'sweep':
      return <SweepFields draft={draft} errors={errors} sweep={judged.sweep} onChange={onChange} />;
    case 'strata':
      return <WeightFields draft={draft} errors={errors} weights={judged.weights} onChange={onChange} />;
    case 'curve':
      return <CurveGoalFields draft={draft} errors={errors} onChange={onChange} />;
    case 'limit':
      return <LimitGoalFields draft={draft} errors={errors} onChange={onChange} />;
  }
}

/** "12 points, at most 6 000 shards." */
function countText({ points, mostShards }: Judged, draft: RunDraft): string {
  if (draft.points === 'curve' || draft.points === 'limit') return 'The planner places the points.';
  if (points === 0) return `${counted(draft.codeIds.length, 'code')} chosen, no points yet.`;
  const shards = mostShards === null ? '' : `, at most ${counted(mostShards, 'shard')}`;
  return `${counted(points, 'point')}${shards}.`;
}

function Part({ title, error, children }: { title: string; error?: string | undefined; children: ReactNode }) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 w-full border-ink border-b pb-1 font-semibold text-lead">{title}</legend>
      {children}
      <PartError text={error} />
    </fieldset>
  );
}
