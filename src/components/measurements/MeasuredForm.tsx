import { type SubmitEvent, useId, useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { newMeasurementSchema } from '@/api/measurements.ts';
import { ApiFailure, call } from '@/client/api.ts';
import { pointsOf, proposedRoles, type Role, readSheet, type Sheet } from '@/client/curves/measured-csv.ts';
import { Button } from '@/components/ui/Button.tsx';
import { NumberField, TextField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import { counted } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';
import { ColumnTable } from './ColumnTable.tsx';

interface Chosen {
  fileName: string;
  sheet: Sheet;
  roles: Role[];
}

const LARGEST_FILE = 5_000_000;

/** A CSV file of error rates: its columns are told or said, its points checked, then kept. */
export default function MeasuredForm({ projectId }: { projectId: string }) {
  const id = useId();
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const [unreadable, setUnreadable] = useState<string | null>(null);
  const [text, setText] = useState({ name: '', n: '', k: '' });
  const [refused, setRefused] = useState<{ message: string; fields: Record<string, string> } | null>(null);
  const [busy, setBusy] = useState(false);
  const set = (part: Partial<typeof text>) => setText({ ...text, ...part });

  const choose = async (file: File) => {
    setUnreadable(null);
    setChosen(null);
    try {
      if (file.size > LARGEST_FILE) throw new Error('The file is larger than 5 MB.');
      const sheet = readSheet(await file.text());
      setChosen({ fileName: file.name, sheet, roles: proposedRoles(sheet.heads) });
      setText((now) => ({ ...now, name: now.name || file.name.replace(/\.[^.]*$/, '') }));
    } catch (error) {
      setUnreadable((error as Error).message);
    }
  };

  const [n, k] = [Number(text.n), Number(text.k)];
  const sized = Number.isInteger(n) && n >= 1 && Number.isInteger(k) && k >= 0 && k <= n && text.k !== '';
  const reading = chosen && sized ? pointsOf(chosen.sheet, chosen.roles, { n, k }) : null;

  const submit = async (event: SubmitEvent<HTMLFormElement>) => {
    event.preventDefault();
    setRefused(null);
    if (!chosen) return setRefused({ message: 'Choose a file first.', fields: {} });
    if (!sized)
      return setRefused({
        message: 'The code’s length and dimension are needed.',
        fields: { n: 'a whole number of bits from 1', k: 'a whole number of bits from 0 to n' },
      });
    if (!reading || 'problem' in reading) return;
    const body = { name: text.name, fileName: chosen.fileName, n, k, points: reading.points };
    const parsed = newMeasurementSchema.safeParse(body);
    if (!parsed.success) {
      const fields = Object.fromEntries(parsed.error.issues.map(({ path, message }) => [path.join('.'), message]));
      const [field, accepted] = Object.entries(fields)[0]!;
      return setRefused({ message: `${placeText(field)}: accepted is ${accepted}.`, fields });
    }
    setBusy(true);
    try {
      const { measurement } = await call(endpoints.createMeasurement, { params: { id: projectId }, body: parsed.data });
      location.assign(`${paths.compare(projectId)}?curves=measured~${measurement.id}`);
    } catch (error) {
      setBusy(false);
      setRefused({ message: (error as Error).message, fields: error instanceof ApiFailure ? { ...error.fields } : {} });
    }
  };

  return (
    <form onSubmit={submit} className="grid max-w-240 gap-5" noValidate>
      <div>
        <label htmlFor={id} className="font-semibold">
          CSV file
        </label>
        <input
          id={id}
          type="file"
          accept=".csv,.tsv,.txt,text/csv"
          className="mt-2 block w-full min-w-0 file:mr-3 file:cursor-pointer file:border file:border-act file:border-solid file:bg-transparent file:px-3 file:py-1.5 file:font-semibold file:text-act"
          onChange={(event) => event.target.files?.[0] && void choose(event.target.files[0])}
        />
      </div>
      {unreadable && (
        <Notice kind="fail" word="Not readable" live>
          {unreadable}
        </Notice>
      )}
      <div className="flex flex-wrap gap-4">
        <TextField
          className="w-72 max-w-full"
          label="name"
          value={text.name}
          maxLength={120}
          error={refused?.fields.name}
          onChange={(event) => set({ name: event.target.value })}
        />
        <NumberField
          className="w-32"
          label="length n"
          value={text.n}
          error={refused?.fields.n}
          onChange={(event) => set({ n: event.target.value })}
        />
        <NumberField
          className="w-32"
          label="dimension k"
          value={text.k}
          error={refused?.fields.k}
          onChange={(event) => set({ k: event.target.value })}
        />
      </div>
      {chosen && (
        <ColumnTable
          sheet={chosen.sheet}
          roles={chosen.roles}
          onRole={(at, role) => setChosen({ ...chosen, roles: chosen.roles.map((r, i) => (i === at ? role : r)) })}
        />
      )}
      {reading &&
        ('problem' in reading ? (
          <Notice kind="caution" word="Not accepted" live>
            {reading.problem}
          </Notice>
        ) : (
          <Notice kind="pass" word="Readable" live>
            {counted(reading.points.length, 'point')}. Intervals will be computed from the counts.
          </Notice>
        ))}
      {refused && (
        <Notice kind="fail" word="Not kept" live>
          {refused.message}
        </Notice>
      )}
      <div>
        <Button kind="primary" type="submit" busy={busy}>
          Add to the comparison
        </Button>
      </div>
    </form>
  );
}

/** "points.3.p" as a reader counts lines: the heads are line 1. */
const placeText = (path: string) => path.replace(/^points\.(\d+)\./, (_, i: string) => `line ${Number(i) + 2}, `);
