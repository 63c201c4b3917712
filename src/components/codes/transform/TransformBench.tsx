import { lazy, Suspense, useEffect, useMemo, useState } from 'react';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { NumberField, TextAreaField, TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { BuildControls } from '../new/BuildControls.tsx';
import { KeepForm } from '../new/KeepForm.tsx';
import { useBuild } from '../new/use-build.ts';
import { beginsAtUpload, nextStep, type Transformed } from './next-step.ts';
import { formOf, type TransformField, type TransformForm, transformForms, transformFrom } from './transform-forms.ts';

const BuiltResult = lazy(() => import('../new/BuiltResult.tsx').then((module) => ({ default: module.BuiltResult })));

interface Props {
  code: Transformed;
  mayKeep: boolean;
  /** The address's query, for the first draw. */
  search: string;
}

type Typed = Record<string, string>;

/** One more transform of a code: stated, built in this browser, kept as a code of its own. The code it came from stays as it
 *  is. */
export default function TransformBench({ code, mayKeep, search }: Props) {
  const [form, setForm] = useState<TransformForm>(() => startingForm(search));
  const [typed, setTyped] = useState<Typed>(() => startingTyped(startingForm(search), search));
  const { build, start, cancel } = useBuild();
  const plan = useMemo(() => nextStep(code, transformFrom(form, typed)), [code, form, typed]);
  useEffect(
    () => history.replaceState(history.state, '', `?${new URLSearchParams({ kind: form.kind, ...typed })}`),
    [form, typed],
  );
  if (!plan)
    return (
      <Notice kind="note" word="Not offered">
        The words of a constant-weight code are no parity checks, so none of these steps can be taken from them.
      </Notice>
    );
  const refused = build.state === 'refused' && build.refusal.kind === 'param' ? build.refusal : null;
  const errorOf = (field: TransformField) =>
    refused?.param.split('.').includes(field.name) ? `accepted is ${refused.accepted}` : undefined;
  const change = (name: string, value: string) => {
    cancel();
    setTyped((before) => ({ ...before, [name]: value }));
  };
  return (
    <div className="grid items-start gap-x-6 gap-y-7 lg:grid-cols-[minmax(0,1fr)_minmax(18rem,22rem)]">
      <div className="grid min-w-0 gap-6">
        <ChoiceGroup
          legend="transform"
          columns
          value={form.kind}
          onChange={(kind) => {
            cancel();
            const next = formOf(kind)!;
            setForm(next);
            setTyped(startingTyped(next, ''));
          }}
          choices={offered(code).map(({ kind, title, note }) => ({ value: kind, label: title, note }))}
        />
        <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
          {form.fields.map((field) => (
            <TransformInput
              key={`${form.kind} ${field.name}`}
              field={field}
              value={typed[field.name] ?? ''}
              error={errorOf(field)}
              onChange={(value) => change(field.name, value)}
            />
          ))}
        </div>
      </div>
      <BuildControls build={build} allowed onStart={() => start(plan)} onCancel={cancel} />
      {build.state === 'built' && (
        <Suspense fallback={<p className="text-quiet">Drawing …</p>}>
          <BuiltResult built={build.built} elapsedMs={build.elapsedMs} kind={build.request.derivation.kind}>
            {mayKeep ? (
              <KeepForm projectId={code.projectId} built={build.built} request={build.request} />
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

const startingForm = (search: string): TransformForm =>
  formOf(new URLSearchParams(search).get('kind') ?? '') ?? transformForms[0]!;

function startingTyped({ fields }: TransformForm, search: string): Typed {
  const given = new URLSearchParams(search);
  return Object.fromEntries(fields.map(({ name, example }) => [name, given.get(name) ?? example]));
}

/** Parallel classes come from a construction; every other step needs the matrix alone. */
const offered = (code: Transformed): readonly TransformForm[] =>
  beginsAtUpload(code) ? transformForms.filter(({ kind }) => kind !== 'keep-classes') : transformForms;

interface InputProps {
  field: TransformField;
  value: string;
  error: string | undefined;
  onChange: (value: string) => void;
}

function TransformInput({ field: { label, hint, kind, name }, value, error, onChange }: InputProps) {
  const common = {
    ...{ label, hint, error, name, value },
    onChange: (event: { target: { value: string } }) => onChange(event.target.value),
  };
  if (kind === 'integer') return <NumberField {...common} inputMode="numeric" />;
  if (kind === 'lines' || kind === 'json')
    return <TextAreaField {...common} spellCheck={false} className="sm:col-span-2 lg:col-span-3" />;
  return <TextField {...common} spellCheck={false} autoComplete="off" />;
}
