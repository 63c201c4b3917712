import type { DesignSpec } from './block-design.ts';
import { familyById } from './families/index.ts';

type Params = DesignSpec['params'];

/** A design in words: "Projective plane PG(2,16)", "Steiner triple system, v = 15, bose". The symbols between a title's
 *  brackets take their values; parameters that the title does not hold follow it. */
export function designTitle(spec: DesignSpec): string {
  const held = new Set<string>();
  const title = familyById(spec.family).title.replace(/\(([^()]+)\)/g, (symbols, inside: string) => {
    const places = inside.split(',').map((text) => placeOf(text.trim(), spec.params));
    if (places.includes(undefined)) return symbols;
    for (const [name] of inside.matchAll(/[a-z]+/g)) held.add(name);
    return `(${places.join(',')})`;
  });
  const rest = Object.entries(spec.params).filter(([name]) => !held.has(name));
  return [title, ...rest.map(([name, value]) => words(name, value))].join(', ');
}

/** One place of a title's brackets: a number or a parameter, perhaps to the power of another, perhaps plus one. */
function placeOf(text: string, params: Params): number | undefined {
  const parts = /^(?<base>[a-z]+|\d+)(?:\^(?<power>[a-z]+|\d+))?(?<plus>\+1)?$/.exec(text)?.groups;
  if (!parts) return undefined;
  const base = numberOf(parts.base!, params);
  const power = parts.power === undefined ? 1 : numberOf(parts.power, params);
  return base === undefined || power === undefined ? undefined : base ** power + (parts.plus ? 1 : 0);
}

function numberOf(text: string, params: Params): number | undefined {
  if (/^\d+$/.test(text)) return Number(text);
  const value = params[text];
  return typeof value === 'number' ? value : undefined;
}

/** λ is written as its letter; a construction and an inner design say by themselves what they are. */
function words(name: string, value: Params[string]): string {
  if (Array.isArray(value)) return `${name} = ${value.join(' ')}`;
  if (typeof value === 'object') return `(${designTitle(value)})`;
  return name === 'method' ? value.toString() : `${name === 'lambda' ? 'λ' : name} = ${value}`;
}
