import { useRef, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { addressOf } from '@/client/api.ts';
import { streamFile } from '@/client/stream-file.ts';
import { Button } from '@/components/ui/Button.tsx';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { Progress } from '@/components/ui/Progress.tsx';
import { saveFile } from '../runs/save-file.ts';
import { VectorFields } from './VectorFields.tsx';
import { emptyVectorDraft, judgeVectors, type VectorRequest } from './vector-draft.ts';

const FORMS = [
  { value: 'jsonl', label: 'JSON Lines', note: 'one object a frame' },
  { value: 'hex', label: 'Hexadecimal text', note: 'one word a line, for a test bench' },
] as const;
type Form = (typeof FORMS)[number]['value'];

/** Makes test vectors of a code on the server and keeps them as a file; says how far it is, and can be cancelled. */
export default function VectorDownload({ codeId }: { codeId: string }) {
  const [draft, setDraft] = useState(emptyVectorDraft);
  const [form, setForm] = useState<Form>('jsonl');
  const [failure, setFailure] = useState<string | null>(null);
  const [frames, setFrames] = useState<number | null>(null);
  const cancel = useRef<AbortController | null>(null);
  const judged = judgeVectors(draft);
  const isBusy = frames !== null;

  const fetchFile = async (request: VectorRequest) => {
    const leave = new AbortController();
    cancel.current = leave;
    setFailure(null);
    setFrames(0);
    try {
      const counter = frameCounter(form, setFrames);
      const input = { params: { id: codeId }, query: queryOf(form, request), signal: leave.signal };
      const { blob, fileName } = await streamFile(endpoints.getVectors, input, counter);
      saveFile(fileName, blob.type, blob);
    } catch (error) {
      if (!leave.signal.aborted) setFailure((error as Error).message);
    } finally {
      setFrames(null);
    }
  };

  return (
    <form
      className="grid gap-5"
      aria-label="Test vectors"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        if (judged.ok) void fetchFile(judged.request);
      }}
    >
      <VectorFields draft={draft} fields={judged.ok ? {} : judged.fields} onChange={setDraft} />
      <ChoiceGroup legend="File" value={form} choices={FORMS} onChange={setForm} />
      {failure && (
        <Notice kind="fail" word="No vectors" live>
          {failure}
        </Notice>
      )}
      {isBusy && judged.ok && (
        <Progress
          label="Frames made"
          value={frames / judged.request.count}
          left={`${wholeNumber(frames)} of ${wholeNumber(judged.request.count)} frames`}
        />
      )}
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button kind="primary" type="submit" busy={isBusy} disabled={!judged.ok}>
          Download vectors
        </Button>
        {isBusy && <Button onClick={() => cancel.current?.abort()}>Cancel</Button>}
        {judged.ok && !isBusy && (
          <a
            className="link text-tiny"
            href={addressOf(endpoints.getVectors, { params: { id: codeId }, query: queryOf(form, judged.request) })}
            download
          >
            address for scripts
          </a>
        )}
      </div>
    </form>
  );
}

const queryOf = (form: Form, { seed, count, channel, decoders }: VectorRequest) => ({
  ...{ form, seed, count },
  channel: JSON.stringify(channel),
  decoders: JSON.stringify(decoders),
});

/** Counts the frames that have come in: lines after the head, or lines that begin with the word. */
function frameCounter(form: Form, tell: (frames: number) => void): (part: Uint8Array) => void {
  const decoder = new TextDecoder();
  let count = form === 'jsonl' ? -1 : 0;
  return (part) => {
    const text = decoder.decode(part, { stream: true });
    count += text.match(form === 'jsonl' ? /\n/g : /^frame /gm)?.length ?? 0;
    tell(Math.max(0, count));
  };
}
