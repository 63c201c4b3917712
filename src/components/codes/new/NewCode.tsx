import { lazy, Suspense, useEffect, useMemo, useState } from 'react';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { TitleBlock } from '@/components/ui/TitleBlock.tsx';
import type { SheetRequest } from '@/core/codes/sheet.ts';
import { shortCitation } from '../citation-text.ts';
import { RefusalNotice } from '../RefusalNotice.tsx';
import { type Choice, choiceFromSearch, choiceToSearch } from './address.ts';
import { BuildControls } from './BuildControls.tsx';
import { type Engine, type FamilyInfo, type Predicted, useEngine } from './engine.ts';
import { KeepForm } from './KeepForm.tsx';
import { ParamFields } from './ParamFields.tsx';
import { paramsFrom, startingParams } from './params.ts';
import { codeRows, designRows } from './prediction-rows.ts';
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
      derivation: { kind: 'ldpc', checks: choice.checks },
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
          legend="checks"
          value={choice.checks}
          onChange={(checks) => choose({ checks })}
          choices={[
            { value: 'blocks', label: 'One check a block', note: 'n = points, the incidence matrix' },
            { value: 'points', label: 'One check a point', note: 'n = blocks, its transpose' },
          ]}
        />
        {refusal && <RefusalNotice refusal={refusal} />}
      </div>
      <div className="grid gap-4">
        <Prediction family={family} predicted={predicted} checks={choice.checks} typed={choice.params} />
        <BuildControls build={build} allowed={predicted.ok} onStart={() => start(request)} onCancel={cancel} />
      </div>
      {build.state === 'built' && (
        <Suspense fallback={<p className="text-quiet">Drawing …</p>}>
          <BuiltResult built={build.built} elapsedMs={build.elapsedMs}>
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
  };
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
  checks: Choice['checks'];
  typed: Record<string, string>;
}

function Prediction({ family, predicted, checks, typed }: PredictionProps) {
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
        rows={[...designRows(`${family.title}, ${params}`, prediction), ...codeRows(prediction, checks)]}
      />
      <p className="mt-2 text-quiet text-tiny">From closed formulas; nothing is built yet.</p>
    </div>
  );
}
