import { type SubmitEvent, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { ChoiceGroup } from '@/components/ui/ChoiceGroup.tsx';
import { SelectField, TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { Progress } from '@/components/ui/Progress.tsx';
import type { UploadSummary } from '@/core/codes/uploaded-sheet.ts';
import type { UploadFormat } from '@/core/formats/recognise.ts';
import { FilePicker } from './FilePicker.tsx';
import { formatTitles, summaryText } from './formats.ts';
import { useUpload } from './use-upload.ts';

const formatChoices = [
  { value: '', label: 'told by its first bytes' },
  ...Object.entries(formatTitles).map(([value, label]) => ({ value, label })),
];

/** Takes a parity-check matrix or a list of blocks from a file as a code of the project. */
export default function UploadCode({ projectId }: { projectId: string }) {
  const { upload, choose, send, cancel } = useUpload(projectId);
  const [format, setFormat] = useState<UploadFormat | ''>('');
  const file = upload.state === 'empty' ? null : upload.file;
  const stated = format === '' ? undefined : format;
  return (
    <div className="grid max-w-168 gap-5">
      <FilePicker
        chosen={file && `${file.name}, ${megabytes(file.size)}`}
        disabled={upload.state === 'sending'}
        onChoose={(next) => void choose(next, stated)}
      />
      <SelectField
        label="Format"
        value={format}
        disabled={upload.state === 'sending'}
        choices={formatChoices}
        onChange={(event) => {
          const next = event.target.value as UploadFormat | '';
          setFormat(next);
          if (file) void choose(file, next === '' ? undefined : next);
        }}
      />
      {upload.state === 'reading' && (
        <div className="grid gap-2">
          <Progress label="Reading the file" value={null} left="Reading the file in this browser" />
          <div>
            <Button onClick={cancel}>Cancel</Button>
          </div>
        </div>
      )}
      {upload.state === 'refused' && (
        <Notice kind="fail" word="Not readable" live>
          {upload.message}
        </Notice>
      )}
      {upload.state === 'sending' && (
        <div className="grid gap-2">
          <Progress
            label="Uploading"
            value={upload.share < 1 ? upload.share : null}
            left={upload.share < 1 ? `${Math.floor(100 * upload.share)} % sent` : 'The server reads and analyses it'}
          />
          <div>
            <Button onClick={cancel}>Cancel</Button>
          </div>
        </div>
      )}
      {upload.state === 'read' && (
        <Meaning
          key={`${upload.file.name} ${upload.file.lastModified} ${format}`}
          summary={upload.summary}
          failure={upload.failure}
          onSend={(meant) =>
            void send(upload.file, upload.summary, { ...meant, format: stated, fileName: upload.file.name })
          }
        />
      )}
    </div>
  );
}

interface Meant {
  name?: string;
  checksAre?: 'rows' | 'columns';
  checks?: 'blocks' | 'points';
}

interface MeaningProps {
  summary: UploadSummary;
  failure: { message: string; fields: Record<string, string> } | undefined;
  onSend: (meant: Meant) => void;
}

/** What the file holds, and what it cannot tell of itself. */
function Meaning({ summary, failure, onSend }: MeaningProps) {
  const [name, setName] = useState('');
  const [checksAre, setChecksAre] = useState<'rows' | 'columns' | ''>(
    summary.kind === 'matrix' && summary.tellsChecks ? 'rows' : '',
  );
  const [checks, setChecks] = useState<'blocks' | 'points'>('points');
  const [asked, setAsked] = useState(false);
  const open = summary.kind === 'matrix' && checksAre === '';
  const submit = (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (open) return setAsked(true);
    const meant = summary.kind === 'matrix' ? { checksAre: checksAre || undefined } : { checks };
    onSend({ ...meant, ...(name.trim() && { name: name.trim() }) });
  };
  return (
    <form onSubmit={submit} className="grid gap-4" noValidate>
      <Notice kind="pass" word="Readable" live>
        {formatTitles[summary.format]}: {summaryText(summary)}.
      </Notice>
      {summary.kind === 'matrix' ? (
        <div>
          <ChoiceGroup
            legend="The parity checks are its"
            value={checksAre}
            onChange={setChecksAre}
            choices={[
              { value: 'rows', label: 'rows', note: `length n = ${summary.cols}` },
              { value: 'columns', label: 'columns', note: `length n = ${summary.rows}` },
            ]}
          />
          {asked && open && (
            <p role="alert" className="mt-1 text-fail text-tiny">
              <span className="font-semibold">Not accepted:</span> say which; the shape of the matrix does not tell.
            </p>
          )}
        </div>
      ) : (
        <ChoiceGroup
          legend="One check of the code for each"
          value={checks}
          onChange={setChecks}
          choices={[
            { value: 'points', label: 'point', note: `length n = ${summary.blocks}, the blocks` },
            { value: 'blocks', label: 'block', note: `length n = ${summary.points}, the points` },
          ]}
        />
      )}
      <TextField
        className="w-72 max-w-full"
        label="name (optional)"
        hint="else the file’s name"
        maxLength={120}
        error={failure?.fields.name}
        value={name}
        onChange={(event) => setName(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not kept" live>
          {failure.message}
        </Notice>
      )}
      <div>
        <Button kind="primary" type="submit">
          Upload and analyse
        </Button>
      </div>
    </form>
  );
}

const megabytes = (bytes: number) => (bytes < 1e5 ? `${bytes} bytes` : `${(bytes / 1e6).toFixed(1)} MB`);
