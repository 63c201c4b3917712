import type { Code } from '@/api/codes.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { paths } from '@/paths.ts';
import { type Choice, choiceToSearch } from '../new/address.ts';
import { transformText } from '../transform/transform-forms.ts';

/** A step's code, where the project keeps it. */
export type Kept = { id: string; name: string } | null;

/** From which design, in which way, by whom and when; each step opens the code that stood there, or the builder with its
 *  parameters where the project does not keep it. */
export function lineageRows(code: Code, kept: readonly Kept[]): TitleRow[] {
  const { design, createdAt, createdBy } = code;
  const params = Object.entries(design.params).map(([name, value]) => `${name} = ${valueText(value)}`);
  return [
    { label: 'Family', value: design.family, note: params.join(', ') },
    ...derivationRows(code, kept),
    { label: 'Kept', value: `${createdAt.slice(0, 16).replace('T', ' ')} UTC`, note: createdBy },
  ];
}

function derivationRows(code: Code, kept: readonly Kept[]): TitleRow[] {
  const { derivation } = code;
  if (derivation.kind === 'constant-weight') {
    const value = derivation.complement ? 'complements of the blocks' : 'the blocks';
    return [{ label: 'Words', value: <Opened code={code} steps={0} kept={null} text={value} /> }];
  }
  if (derivation.kind === 'matrix') {
    const note = derivation.checksAre === 'rows' ? undefined : 'turned over when it was read';
    return [{ label: 'Matrix', value: `as uploaded, its ${derivation.checksAre} are the checks`, note }];
  }
  const steps = derivation.transforms ?? [];
  const byBlocks = derivation.checks === 'blocks';
  return [
    {
      label: 'Matrix',
      value: (
        <Opened
          code={code}
          steps={0}
          kept={kept[0] ?? null}
          text={byBlocks ? 'one check a block' : 'one check a point'}
        />
      ),
      note: byBlocks ? 'rows are blocks, columns points' : 'rows are points, columns blocks',
    },
    ...(steps.length === 0
      ? [{ label: 'Transforms', value: 'none' }]
      : steps.map((step, i) => ({
          label: `Step ${i + 1}`,
          value:
            i + 1 === steps.length ? (
              transformText(step)
            ) : (
              <Opened code={code} steps={i + 1} kept={kept[i + 1] ?? null} text={transformText(step)} />
            ),
          note: i + 1 === steps.length ? 'this code' : undefined,
        }))),
  ];
}

interface OpenedProps {
  code: Code;
  /** Transforms already made at this step. */
  steps: number;
  kept: Kept;
  text: string;
}

function Opened({ code, steps, kept, text }: OpenedProps) {
  const { projectId, design, derivation } = code;
  // A file gives nothing to build again.
  if (!kept && design.family === 'uploaded') return <>{text}</>;
  const isThis = derivation.kind !== 'ldpc' || (derivation.transforms ?? []).length === 0;
  const href = kept ? paths.code(projectId, kept.id) : paths.newCode(projectId) + choiceToSearch(choiceAt(code, steps));
  const where = isThis ? 'open in the builder' : kept ? `kept as ${kept.name}` : 'not kept: open in the builder';
  return (
    <>
      {text}
      <a className="link block font-normal text-tiny" href={href}>
        {where}
      </a>
    </>
  );
}

function choiceAt({ design, derivation }: Code, steps: number): Choice {
  const typed = Object.entries(design.params).map(([name, value]) => [name, typedText(value)]);
  const params = Object.fromEntries(typed) as Record<string, string>;
  const choice = { family: design.family, params, checks: 'blocks' as const };
  if (derivation.kind === 'constant-weight')
    return { ...choice, words: derivation.complement ? 'complements' : 'blocks' };
  if (derivation.kind !== 'ldpc') return choice;
  return { ...choice, checks: derivation.checks, transforms: (derivation.transforms ?? []).slice(0, steps) };
}

/** A parameter as its field holds it. */
function typedText(value: unknown): string {
  if (Array.isArray(value)) return value.join(' ');
  return typeof value === 'object' ? JSON.stringify(value) : String(value);
}

function valueText(value: unknown): string {
  if (typeof value === 'number') return wholeNumber(value);
  return typeof value === 'string' ? value : JSON.stringify(value);
}
