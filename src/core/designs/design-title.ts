import type { DesignSpec } from './block-design.ts';
import { familyById } from './families/index.ts';

/** A design in words: "projective plane, q = 16". */
export function designTitle(spec: DesignSpec): string {
  const { title } = familyById(spec.family);
  const params = Object.entries(spec.params).map(([name, value]) => `${symbolOf(name)} = ${wordsFor(value)}`);
  return [title, ...params].join(', ');
}

/** λ is written as its letter; other parameters by their names. */
const symbolOf = (name: string) => (name === 'lambda' ? 'λ' : name);

function wordsFor(value: DesignSpec['params'][string]): string {
  if (typeof value === 'object') return Array.isArray(value) ? value.join(' ') : `(${designTitle(value)})`;
  return String(value);
}
