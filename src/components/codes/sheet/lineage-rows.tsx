import type { Code } from '@/api/codes.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { paths } from '@/paths.ts';
import { type Choice, choiceToSearch } from '../new/address.ts';
import { transformSearch, transformText } from '../transform/transform-forms.ts';

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
  switch (derivation.kind) {
    case 'constant-weight': {
      const value = derivation.complement ? 'complements of the blocks' : 'the blocks';
      return [{ label: 'Words', value: <Opened code={code} steps={[]} kept={null} text={value} /> }];
    }
    case 'matrix': {
      const note = derivation.checksAre === 'rows' ? undefined : 'turned over when it was read';
      return [{ label: 'Matrix', value: `as uploaded, its ${derivation.checksAre} are the checks`, note }];
    }
    case 'stored': {
      const value = <Opened code={code} steps={[]} kept={kept[0] ?? null} text="as uploaded" />;
      const note = `fingerprint ${derivation.base.slice(0, 8)} …`;
      return [{ label: 'Matrix', value, note }, ...stepRows(code, derivation.transforms, kept)];
    }
    case 'ldpc': {
      const byBlocks = derivation.checks === 'blocks';
      const text = byBlocks ? 'one check a block' : 'one check a point';
      return [
        {
          label: 'Matrix',
          value: <Opened code={code} steps={[]} kept={kept[0] ?? null} text={text} />,
          note: byBlocks ? 'rows are blocks, columns points' : 'rows are points, columns blocks',
        },
        ...stepRows(code, derivation.transforms ?? [], kept),
      ];
    }
  }
}

function stepRows(code: Code, steps: readonly Step[], kept: readonly Kept[]): TitleRow[] {
  if (steps.length === 0) return [{ label: 'Transforms', value: 'none' }];
  return steps.map((step, i) => {
    const label = `Step ${i + 1}`;
    const text = transformText(step);
    if (i + 1 === steps.length) return { label, value: text, note: 'this code' };
    const made = steps.slice(0, i + 1);
    return {
      label,
      value: <Opened code={code} steps={made} kept={kept[i + 1] ?? null} before={kept[i]} text={text} />,
    };
  });
}

type Step = { kind: string };

interface OpenedProps {
  code: Code;
  /** Transforms made up to this step. */
  steps: readonly Step[];
  kept: Kept;
  /** The code of the step before, where it is kept. */
  before?: Kept;
  text: string;
}

function Opened({ code, steps, kept, before, text }: OpenedProps) {
  const opening = openingOf(code, steps, kept, before ?? null);
  if (!opening) return <>{text}</>;
  return (
    <>
      {text}
      <a className="link block font-normal text-tiny" href={opening.href}>
        {opening.where}
      </a>
    </>
  );
}

/** The kept code of a step, or where it can be made again: in the builder or, for steps from an upload, from the code of the
 *  step before. */
function openingOf(
  code: Code,
  steps: readonly Step[],
  kept: Kept,
  before: Kept,
): { href: string; where: string } | null {
  const { projectId, design, derivation } = code;
  const isStep =
    derivation.kind === 'stored' || (derivation.kind === 'ldpc' && (derivation.transforms ?? []).length > 0);
  if (kept)
    return { href: paths.code(projectId, kept.id), where: isStep ? `kept as ${kept.name}` : 'open in the builder' };
  if (design.family !== 'uploaded') {
    const href = paths.newCode(projectId) + choiceToSearch(choiceAt(code, steps.length));
    return { href, where: isStep ? 'not kept: open in the builder' : 'open in the builder' };
  }
  const last = steps.at(-1);
  if (!before || !last) return null;
  const href = paths.transform(projectId, before.id) + transformSearch(last);
  return { href, where: 'not kept: take this step again' };
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
