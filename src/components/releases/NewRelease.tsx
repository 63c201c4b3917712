import { type ReactNode, useRef, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { endpoints } from '@/api/endpoints.ts';
import type { CodeForms, NewRelease as ReleaseRequest } from '@/api/releases.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { useApi } from '@/client/hooks.ts';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField, TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { Progress } from '@/components/ui/Progress.tsx';
import { paths } from '@/paths.ts';
import { Checks } from './Checks.tsx';
import { VectorFields } from './VectorFields.tsx';
import { emptyVectorDraft, judgeVectors } from './vector-draft.ts';

type Contents = ReleaseRequest['contents'];
type VectorForm = NonNullable<Contents['vectors']>['forms'][number];

interface Props {
  projectId: string;
  codes: readonly Pick<Code, 'id' | 'name'>[];
  /** The code chosen first, from the address. */
  chosen: string;
}

const VECTOR_FORMS = [
  { id: 'jsonl', title: 'JSON Lines' },
  { id: 'hex', title: 'hexadecimal text' },
] as const;

/** Chooses a code and what is given of it, and has the bundle made and frozen. */
export default function NewRelease({ projectId, codes, chosen }: Props) {
  const [codeId, setCodeId] = useState(chosen);
  const [note, setNote] = useState('');
  const [formats, setFormats] = useState<Contents['formats']>(['alist', 'mtx', 'json', 'npz', 'c']);
  const [generators, setGenerators] = useState<Contents['generators']>(['polynomial', 'circulants', 'systematic']);
  const [blocks, setBlocks] = useState<Contents['blocks']>(['text']);
  const [vectorForms, setVectorForms] = useState<VectorForm[]>([]);
  const [vectors, setVectors] = useState(emptyVectorDraft);
  const { data: forms, error: formsError } = useApi(endpoints.getForms, { params: { id: codeId } });
  const { making, failure, make, cancel } = useMaking(projectId);

  const judged = judgeVectors(vectors);
  const wantsVectors = vectorForms.length > 0;
  const kept = forms && {
    formats: within(formats, forms.formats),
    generators: within(generators, forms.generators),
    blocks: within(blocks, forms.blocks),
  };
  const isReady = kept !== undefined && kept.formats.length > 0 && (!wantsVectors || judged.ok);
  const submit = () => {
    if (!isReady) return;
    const asked = wantsVectors && judged.ok && { vectors: { ...judged.request, forms: vectorForms } };
    void make({ codeId, note, contents: { ...kept, ...asked } });
  };

  return (
    <form
      className="grid max-w-3xl gap-7"
      aria-label="New release"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
    >
      <Part title="Code">
        <SelectField
          label="kept in this project"
          value={codeId}
          onChange={(event) => setCodeId(event.target.value)}
          choices={codes.map(({ id, name }) => ({ value: id, label: name }))}
        />
      </Part>
      <Part title="Files">
        {forms ? (
          <FileChoice
            forms={forms}
            {...kept!}
            onFormats={setFormats}
            onGenerators={setGenerators}
            onBlocks={setBlocks}
          />
        ) : (
          <p className="text-quiet">{formsError?.message ?? 'What the code can be given as is being looked up.'}</p>
        )}
      </Part>
      <Part title="Test vectors">
        <Checks legend="As" choices={VECTOR_FORMS} chosen={vectorForms} onChange={setVectorForms} />
        {wantsVectors && <VectorFields draft={vectors} fields={judged.ok ? {} : judged.fields} onChange={setVectors} />}
      </Part>
      <Part title="Note">
        <TextAreaField
          label="for whom, what for"
          hint="stands in the manifest; at most 2000 characters"
          maxLength={2000}
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
      </Part>
      {failure && (
        <Notice kind="fail" word="Not released" live>
          {failure}
        </Notice>
      )}
      <div className="grid gap-3 border-ink border-t pt-4">
        {making && <Progress label="The bundle is being made" value={null} left="Making and storing the files" />}
        <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
          <Button kind="primary" type="submit" busy={making} disabled={!isReady}>
            Release
          </Button>
          {making && <Button onClick={cancel}>Cancel</Button>}
          <p className="text-quiet">A release is frozen: it is never edited, only superseded or withdrawn.</p>
        </div>
      </div>
    </form>
  );
}

const within = <Id extends string>(chosen: readonly Id[], offered: readonly { id: Id }[]): Id[] =>
  offered.map(({ id }) => id).filter((id) => chosen.includes(id));

/** The request under way: one at a time, and cancelled without a release. */
function useMaking(projectId: string) {
  const [making, setMaking] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const leaving = useRef<AbortController | null>(null);
  const make = async (body: ReleaseRequest) => {
    const leave = new AbortController();
    leaving.current = leave;
    setMaking(true);
    setFailure(null);
    try {
      const params = { id: projectId };
      const { release } = await call(endpoints.createRelease, { params, body, signal: leave.signal });
      location.assign(paths.release(projectId, release.id));
    } catch (error) {
      setMaking(false);
      if (leave.signal.aborted) return;
      setFailure(error instanceof ApiFailure ? error.message : 'The release could not be made; try again.');
    }
  };
  return { making, failure, make, cancel: () => leaving.current?.abort() };
}

interface FileChoiceProps extends Pick<Contents, 'formats' | 'generators' | 'blocks'> {
  forms: CodeForms;
  onFormats: (chosen: Contents['formats']) => void;
  onGenerators: (chosen: Contents['generators']) => void;
  onBlocks: (chosen: Contents['blocks']) => void;
}

function FileChoice({ forms, formats, generators, blocks, onFormats, onGenerators, onBlocks }: FileChoiceProps) {
  return (
    <div className="grid gap-5">
      <Checks
        legend="Parity-check matrix"
        choices={forms.formats}
        chosen={formats}
        error={formats.length === 0 ? 'at least one format' : undefined}
        onChange={onFormats}
      />
      <Checks legend="Generator" choices={forms.generators} chosen={generators} onChange={onGenerators} />
      {forms.blocks.length > 0 && <Checks legend="Design" choices={forms.blocks} chosen={blocks} onChange={onBlocks} />}
    </div>
  );
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="grid gap-4">
      <h2 className="border-ink border-b pb-1">{title}</h2>
      {children}
    </section>
  );
}
