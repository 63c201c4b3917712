import { typedNumber } from '@/components/ui/typed-number.ts';

export interface TransformField {
  name: string;
  label: string;
  hint: string;
  kind: 'integer' | 'list' | 'text' | 'lines' | 'json';
  example: string;
}

export interface TransformForm {
  kind: string;
  title: string;
  note: string;
  fields: readonly TransformField[];
}

const integer = (name: string, label: string, hint: string, example: string): TransformField => ({
  name,
  label,
  hint,
  kind: 'integer',
  example,
});

/** How each kind of transform is asked for; tests/components/codes/transform.test.tsx holds it to the engine's own list. */
export const transformForms: readonly TransformForm[] = [
  {
    kind: 'shorten',
    title: 'Shorten',
    note: 'n and k fall together',
    fields: [integer('bits', 'bits', 'fewer than k', '8')],
  },
  {
    kind: 'puncture',
    title: 'Puncture',
    note: 'bits that are not sent',
    fields: [
      { name: 'columns', label: 'columns', hint: 'from 0 to n − 1, parted by blanks', kind: 'list', example: '0' },
    ],
  },
  { kind: 'extend-by-parity', title: 'Extend by parity', note: 'one bit over all', fields: [] },
  { kind: 'drop-dependent-rows', title: 'Drop dependent rows', note: 'n − k checks stay', fields: [] },
  {
    kind: 'keep-classes',
    title: 'Keep parallel classes',
    note: 'of a resolved design',
    fields: [
      {
        name: 'classes',
        label: 'classes',
        hint: 'their numbers from 0, parted by blanks',
        kind: 'list',
        example: '0 1 2',
      },
    ],
  },
  {
    kind: 'split-columns',
    title: 'Split columns',
    note: 'longer, of higher rate',
    fields: [integer('parts', 'parts', 'from 2, at most the least weight', '2')],
  },
  {
    kind: 'split-rows',
    title: 'Split rows',
    note: 'lighter checks, lower rate',
    fields: [integer('parts', 'parts', 'from 2, at most the least weight', '2')],
  },
  {
    kind: 'lift',
    title: 'Lift by circulants',
    note: 'quasi-cyclic',
    fields: [
      integer('size', 'circulant size', 'from 2 to 4096', '16'),
      integer('girth', 'girth', '4, 6, 8, 10 or 12', '6'),
      { name: 'seed', label: 'seed', hint: 'any text', kind: 'text', example: 'lift' },
      integer('attempts', 'draws', 'from 1 to 1000', '20'),
    ],
  },
  {
    kind: 'mask',
    title: 'Mask blocks',
    note: 'clears square blocks',
    fields: [
      integer('blockSize', 'block size', 'a divisor of rows and columns', '1'),
      { name: 'mask', label: 'mask', hint: 'a line of 0 and 1 for each row of blocks', kind: 'lines', example: '1' },
    ],
  },
  {
    kind: 'superpose',
    title: 'Superpose constituents',
    note: 'a matrix for each one',
    fields: [
      {
        name: 'constituents',
        label: 'constituents',
        hint: 'JSON: [{"cols": 2, "rows": [[0], [1]]}], columns of each row from 0',
        kind: 'json',
        example: '[{"cols": 2, "rows": [[0], [1]]}, {"cols": 2, "rows": [[1], [0]]}]',
      },
    ],
  },
  { kind: 'transpose', title: 'Transpose', note: 'checks and bits change places', fields: [] },
];

/** The transform that a form states. What cannot be read goes through as text, for the engine to refuse. */
export function transformFrom(form: TransformForm, typed: Record<string, string>): { kind: string } {
  const params = form.fields.map(({ name, kind }) => [name, readField(kind, (typed[name] ?? '').trim())]);
  return { kind: form.kind, ...Object.fromEntries(params) };
}

function readField(kind: TransformField['kind'], text: string): unknown {
  switch (kind) {
    case 'integer':
      return typedNumber(text) ?? text;
    case 'list':
      return text
        .split(/[\s,;]+/)
        .filter(Boolean)
        .map(Number);
    case 'lines':
      return text.split(/\s+/).filter(Boolean);
    case 'json':
      try {
        return JSON.parse(text);
      } catch {
        return text;
      }
    case 'text':
      return text;
  }
}

export const formOf = (kind: string): TransformForm | undefined => transformForms.find((form) => form.kind === kind);

/** The address's query that fills the form with a transform. */
export function transformSearch({ kind, ...params }: { kind: string }): string {
  const typed = Object.entries(params).map(([name, value]) => {
    const field = formOf(kind)?.fields.find((one) => one.name === name);
    return [name, typedText(field?.kind, value)];
  });
  return `?${new URLSearchParams({ kind, ...Object.fromEntries(typed) })}`;
}

function typedText(kind: TransformField['kind'] | undefined, value: unknown): string {
  if (Array.isArray(value) && kind !== 'json') return value.join(kind === 'lines' ? '\n' : ' ');
  return typeof value === 'object' ? JSON.stringify(value) : String(value);
}

/** A transform in words: "Shorten, bits 8". */
export function transformText(transform: { kind: string }): string {
  const { kind, ...params } = transform;
  const form = formOf(kind);
  const stated = Object.entries(params).map(([name, value]) => {
    const label = form?.fields.find((field) => field.name === name)?.label ?? name;
    const text = typeof value === 'object' ? JSON.stringify(value) : String(value);
    return `${label} ${text.length > 60 ? `${text.slice(0, 57)}…` : text}`;
  });
  return [form?.title ?? kind, ...stated].join(', ');
}
