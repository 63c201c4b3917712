import type { Code } from '@/api/codes.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import type { TitleRow } from '@/components/ui/TitleBlock.tsx';
import { transformText } from '../transform/transform-forms.ts';

/** From which design, in which way, by whom and when. */
export function lineageRows(code: Code): TitleRow[] {
  const { design, derivation, createdAt, createdBy } = code;
  const params = Object.entries(design.params).map(([name, value]) => `${name} = ${valueText(value)}`);
  return [
    { label: 'Family', value: design.family, note: params.join(', ') },
    ...derivationRows(derivation),
    { label: 'Kept', value: `${createdAt.slice(0, 16).replace('T', ' ')} UTC`, note: createdBy },
  ];
}

function derivationRows(derivation: Code['derivation']): TitleRow[] {
  if (derivation.kind === 'constant-weight') {
    return [{ label: 'Words', value: derivation.complement ? 'complements of the blocks' : 'the blocks' }];
  }
  if (derivation.kind === 'matrix') {
    const note = derivation.checksAre === 'rows' ? undefined : 'turned over when it was read';
    return [{ label: 'Matrix', value: `as uploaded, its ${derivation.checksAre} are the checks`, note }];
  }
  const steps = derivation.transforms ?? [];
  return [
    {
      label: 'Matrix',
      value: derivation.checks === 'blocks' ? 'one check a block' : 'one check a point',
      note: derivation.checks === 'blocks' ? 'rows are blocks, columns points' : 'rows are points, columns blocks',
    },
    ...(steps.length === 0
      ? [{ label: 'Transforms', value: 'none' }]
      : steps.map((step, i) => ({ label: `Step ${i + 1}`, value: transformText(step) }))),
  ];
}

function valueText(value: unknown): string {
  if (typeof value === 'number') return wholeNumber(value);
  return typeof value === 'string' ? value : JSON.stringify(value);
}
