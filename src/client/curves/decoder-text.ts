import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

const names: Record<DecoderSpec['kind'], string> = {
  'majority-logic': 'one-step majority logic',
  'gallager-a': 'Gallager A',
  'gallager-b': 'Gallager B',
  'bit-flipping': 'parallel bit flipping',
  'bit-flipping-max': 'bit flipping, most failing checks',
  'gradient-descent': 'gradient-descent bit flipping',
  'finite-alphabet': 'finite-alphabet iterative',
  peeling: 'peeling',
  elimination: 'elimination',
  'sum-product': 'sum-product',
  'min-sum': 'min-sum',
  'two-stage': 'two-stage',
};

const shortNames: Partial<Record<DecoderSpec['kind'], string>> = {
  'majority-logic': 'one-step',
  'bit-flipping': 'bit flipping',
  'bit-flipping-max': 'bit flipping max',
  'gradient-descent': 'gradient descent',
  'finite-alphabet': 'finite alphabet',
};

export const decoderName = (spec: DecoderSpec): string => names[spec.kind];

/** For the end of a curve, where room is short. */
export const decoderShortName = (spec: DecoderSpec): string => shortNames[spec.kind] ?? names[spec.kind];

/** Its parameters in words: "20 iterations, threshold 9"; empty when all are left to their defaults. */
export function decoderDetail(spec: DecoderSpec): string {
  return parametersOf(spec)
    .map(([key, value]) => {
      if (key === 'iterations') return value === 1 ? '1 iteration' : `${String(value)} iterations`;
      if (key === 'designP') return `set for p = ${String(value)}`;
      if (key === 'stages') return (value as DecoderSpec[]).map(decoderText).join(', then ');
      return `${key} ${Array.isArray(value) ? value.flat().join(' ') : String(value)}`;
    })
    .join(', ');
}

/** Name and parameters: "Gallager B, 20 iterations". */
export function decoderText(spec: DecoderSpec): string {
  const detail = decoderDetail(spec);
  return detail === '' ? decoderName(spec) : `${decoderName(spec)}, ${detail}`;
}

/** The same text for the same decoder and parameters, in whatever order they were written; fit for an address. */
export function decoderKey(spec: DecoderSpec): string {
  const parameters = parametersOf(spec).map(([key, value]) => `${key}=${keyText(value)}`);
  return [spec.kind, ...parameters].join('.');
}

const keyText = (value: unknown): string =>
  typeof value === 'object' ? JSON.stringify(value).replaceAll(/["~,]/g, '_') : String(value);

const parametersOf = (spec: DecoderSpec): [string, unknown][] =>
  Object.entries(spec)
    .filter(([key, value]) => key !== 'kind' && value !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : 1));
