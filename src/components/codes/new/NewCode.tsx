import { lazy, Suspense, useEffect, useMemo, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import type { SheetRequest } from '@/core/codes/sheet.ts';
import { shortCitation } from '../citation-text.ts';
import { RefusalNotice } from '../RefusalNotice.tsx';
import { transformText } from '../transform/transform-forms.ts';
import { type Choice, choiceFromSearch, choiceToSearch, derivationOf } from './address.ts';
import { BuildControls } from './BuildControls.tsx';
import { type Engine, type FamilyInfo, type Predicted, useEngine } from './engine.ts';
import { KeepForm } from './KeepForm.tsx';
import { ParamFields } from './ParamFields.tsx';
import { paramsFrom, startingParams } from './params.ts';
import { codeRows, designRows, wordRows } from './prediction-rows.ts';
import { useBuild } from './use-build.ts';

const BuiltResult = lazy(() => import('./BuiltResult.tsx').then((module) => ({ default: module.BuiltResult })));

interface Props {
  projectId: string;
  /** Viewers and reviewers may build in their browser, not keep. */
  mayKeep: boolean;
  /** The address's query, for the first draw. */
  search: string;
}

/** Choose a construction, see what formulas say of it, build and verify it, keep it. */
export default function NewCode({ projectId, mayKeep, search }: Props) {
  const { engine, failed } = useEngine();
  if (failed) {
    return (
      <Notice kind="fail" word="Not loaded" live>
        The engine could not be fetched; load the page again.
      </Notice>
    );
  }
  if (!engine) return <p className="text-quiet">Loading the constructions …</p>;
  return <Bench engine={engine} projectId={projectId} mayKeep={mayKeep} search={search} />;
}

function Bench({ engine, projectId, mayKeep, search }: Props & { engine: Engine }) {
  const [choice, setChoice] = useState<Choice>(() => startingChoice(engine.families, search));
  const { build, start, cancel } = useBuild();
  const family = engine.families.find(({ id }) => id === choice.family) ?? engine.families[0]!;
  const request = useMemo<SheetRequest>(
    () => ({
      design: { family: family.id, params: paramsFrom(family.params, choice.params) },
      derivation: derivationOf(choice),
    }),
    [family, choice],
  );
  const predicted = useMemo(() => engine.predict(request.design), [engine, request]);
  const refusal = predicted.ok ? null : predicted.refusal;
  useEffect(() => history.replaceState(history.state, '', choiceToSearch(choice)), [choice]);

  const choose = (next: Partial<Choice>) => {
    cancel();
    setChoice((before) => ({ ...before, ...next }));
  };

  return (
    <div className="grid items-start gap-x-6 gap-y-7 lg:grid-cols-[minmax(0,1fr)_minmax(20rem,24rem)]">
      <div className="grid min-w-0 gap-6">
        <FamilyChoice
          families={engine.families}
          value={family.id}
          onChange={(chosen) => choose({ family: chosen.id, params: startingParams(chosen.params) })}
        />
        <ParamFields
          infos={family.params}
          values={choice.params}
          refusal={refusal}
          onChange={(name, value) => choose({ params: { ...choice.params, [name]: value } })}
        />
        <ChoiceGroup
          legend="code"
          value={choice.words ? (`words-${choice.words}` as const) : choice.checks}
          onChange={(form) => choose(formChosen(form))}
          choices={[
            { value: 'blocks', label: 'One check a block', note: 'n = points, the incidence matrix' },
            { value: 'points', label: 'One check a point', note: 'n = blocks, its transpose' },
            { value: 'words-blocks', label: 'Words are blocks', note: 'constant weight, n = points' },
            { value: 'words-complements', label: 'Words are complements', note: 'ones and zeros exchanged' },
          ]}
        />
        {!choice.words && choice.transforms && (
          <Steps steps={choice.transforms} onRemove={() => choose({ transforms: undefined })} />
        )}
        {refusal && <RefusalNotice refusal={refusal} />}
      </div>
      <div className="grid gap-4">
        <Prediction family={family} predicted={predicted} choice={choice} />
        <BuildControls
          build={build}
          allowed={predicted.ok}
          onStart={() => start({ keep: request, work: () => request })}
          onCancel={cancel}
        />
      </div>
      {build.state === 'built' && (
        <Suspense fallback={<p className="text-quiet">Drawing …</p>}>
          <BuiltResult built={build.built} elapsedMs={build.elapsedMs} kind={build.request.derivation.kind}>
            {mayKeep ? (
              <KeepForm projectId={projectId} built={build.built} request={build.request} />
            ) : (
              <Notice kind="note" word="Not kept">
                Only an engineer or the owner can keep a code in this project.
              </Notice>
            )}
          </BuiltResult>
        </Suspense>
      )}
    </div>
  );
}

function startingChoice(families: readonly FamilyInfo[], search: string): Choice {
  const given = choiceFromSearch(search);
  const family = families.find(({ id }) => id === given.family) ?? families[0]!;
  return {
    family: family.id,
    params: startingParams(family.params, family.id === given.family ? given.params : {}),
    checks: given.checks ?? 'blocks',
    words: given.words,
    transforms: given.transforms,
  };
}

type CodeForm = Choice['checks'] | `words-${NonNullable<Choice['words']>}`;

function formChosen(form: CodeForm): Pick<Choice, 'words'> & Partial<Choice> {
  if (form === 'blocks' || form === 'points') return { checks: form, words: undefined };
  return { words: form === 'words-blocks' ? 'blocks' : 'complements' };
}

/** Steps that an address asks for, from a kept code's lineage or a candidate. */
function Steps({ steps, onRemove }: { steps: NonNullable<Choice['transforms']>; onRemove: () => void }) {
  return (
    <section aria-label="Transforms">
      <h2 className="text-quiet text-tiny">then</h2>
      <ol className="ml-5 list-decimal">
        {steps.map((step, at) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: steps are a fixed listing and may repeat
          <li key={at}>{transformText(step)}</li>
        ))}
      </ol>
      <Button size="small" className="mt-2" onClick={onRemove}>
        Without these steps
      </Button>
    </section>
  );
}

interface FamilyChoiceProps {
  families: readonly FamilyInfo[];
  value: string;
  onChange: (family: FamilyInfo) => void;
}

function FamilyChoice({ families, value, onChange }: FamilyChoiceProps) {
  return (
    <ChoiceGroup
      legend="construction"
      columns
      value={value}
      onChange={(id) => {
        const family = families.find((candidate) => candidate.id === id);
        if (family) onChange(family);
      }}
      choices={families.map(({ id, title, source }) => ({ value: id, label: title, note: shortCitation(source) }))}
    />
  );
}

interface PredictionProps {
  family: FamilyInfo;
  predicted: Predicted;
  choice: Choice;
}

function Prediction({ family, predicted, choice }: PredictionProps) {
  const typed = choice.params;
  const stated = family.params.filter(({ name, optional }) => typed[name] || !optional);
  const params = stated.map(({ name }) => `${name} = ${typed[name] || '…'}`).join(', ');
  if (!predicted.ok) {
    return (
      <TitleBlock
        title="Prediction"
        rows={[
          { label: 'Design', value: `${family.title}, ${params}` },
          { label: 'Code', value: 'none' },
        ]}
      />
    );
  }
  const { prediction } = predicted;
  return (
    <div aria-live="polite">
      <TitleBlock
        title="Prediction"
        rows={[
          ...designRows(`${family.title}, ${params}`, prediction),
          ...(choice.words ? wordRows(prediction, choice.words) : codeRows(prediction, choice.checks)),
        ]}
      />
      <p className="mt-2 text-quiet text-tiny">
        From closed formulas; nothing is built yet.
        {!choice.words && choice.transforms && ' They tell of the matrix before its transforms.'}
      </p>
    </div>
  );
}
