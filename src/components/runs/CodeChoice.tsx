import { useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { ButtonLink } from '@/components/ui/Button.tsx';
import { EmptyState } from '@/components/ui/EmptyState.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { paths } from '@/paths.ts';
import { PartError } from './PartError.tsx';

interface Props {
  projectId: string;
  codes: readonly Code[];
  chosen: readonly string[];
  error: string | undefined;
  onChange: (codeIds: string[]) => void;
}

const FILTER_FROM = 12;

/** The kept codes, any number of which are measured. */
export function CodeChoice({ projectId, codes, chosen, error, onChange }: Props) {
  const [filter, setFilter] = useState('');
  const measurable = codes.filter((code) => code.derivation.kind !== 'constant-weight');
  const shown = measurable.filter((code) =>
    `${code.name} ${code.designTitle} ${code.n} ${code.k}`.toLowerCase().includes(filter.toLowerCase()),
  );
  if (measurable.length === 0) return <NoCodes projectId={projectId} />;
  const toggle = (id: string, isChosen: boolean) =>
    onChange(isChosen ? [...chosen, id] : chosen.filter((other) => other !== id));
  return (
    <div>
      {measurable.length > FILTER_FROM && (
        <TextField label="Filter" value={filter} onChange={(event) => setFilter(event.target.value)} className="mb-2" />
      )}
      <ul className="max-h-80 overflow-y-auto">
        {shown.map((code) => (
          <li key={code.id} className="border-hair border-b">
            <label className="flex cursor-pointer items-baseline gap-2.5 py-2">
              <input
                type="checkbox"
                className="accent-act"
                checked={chosen.includes(code.id)}
                onChange={(event) => toggle(code.id, event.target.checked)}
              />
              <span className="min-w-0">
                <span className="font-semibold">{code.name}</span>{' '}
                <span className="font-mono text-tiny">
                  ({wholeNumber(code.n)}, {wholeNumber(code.k)})
                </span>
                <span className="block text-quiet text-tiny">{code.designTitle}</span>
              </span>
            </label>
          </li>
        ))}
      </ul>
      <PartError text={error} />
    </div>
  );
}

function NoCodes({ projectId }: { projectId: string }) {
  return (
    <EmptyState
      title="No codes kept yet"
      action={
        <ButtonLink kind="primary" href={paths.newCode(projectId)}>
          Build a code
        </ButtonLink>
      }
    >
      A run measures kept codes with a parity-check matrix.
    </EmptyState>
  );
}
