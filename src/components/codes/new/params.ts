import { typedNumber } from '@/components/ui/typed-number.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import type { ParamInfo } from '@/core/designs/family.ts';

/** A family's parameters as its form begins: what is given, else a value that works. */
export function startingParams(
  infos: readonly ParamInfo[],
  given: Record<string, string> = {},
): Record<string, string> {
  return Object.fromEntries(
    infos.map((info) => [info.name, given[info.name] ?? (info.optional ? '' : String(info.example))]),
  );
}

/** Typed texts as the engine takes them. What cannot be read goes through as text, for the engine to refuse. */
export function paramsFrom(infos: readonly ParamInfo[], typed: Record<string, string>): DesignSpec['params'] {
  const params: DesignSpec['params'] = {};
  for (const info of infos) {
    const text = (typed[info.name] ?? '').trim();
    if (text === '' && info.optional) continue;
    params[info.name] = valueFrom(info, text);
  }
  return params;
}

function valueFrom(info: ParamInfo, text: string): DesignSpec['params'][string] {
  if (info.kind === 'list')
    return text
      .split(/[\s,;]+/)
      .filter(Boolean)
      .map(Number);
  if (info.kind === 'spec') return innerSpec(text);
  const numeric = info.kind === 'integer' || (info.kind === 'choice' && typeof info.example === 'number');
  if (!numeric) return text;
  const value = typedNumber(text);
  return value === undefined || Number.isNaN(value) ? text : value;
}

function innerSpec(text: string): DesignSpec | string {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === 'object' && value !== null && 'family' in value ? (value as DesignSpec) : text;
  } catch {
    return text;
  }
}
