import type { Transform } from '@/core/codes/ldpc.ts';
import type { SheetRequest } from '@/core/codes/sheet.ts';

/** What is to be built, as typed: parameters stay text until the engine judges them. */
export interface Choice {
  family: string;
  params: Record<string, string>;
  checks: 'blocks' | 'points';
  /** A constant-weight code of these words, in place of parity checks. */
  words?: 'blocks' | 'complements';
  /** Steps after the matrix, in order; they come with an address and are not typed here. */
  transforms?: Transform[];
}

const RESERVED = ['family', 'checks', 'words', 'transforms'];

/** The choice in an address: ?family=projective-plane&q=16&checks=blocks. */
export function choiceToSearch({ family, params, checks, words, transforms }: Choice): string {
  const search = new URLSearchParams({ family });
  for (const [name, value] of Object.entries(params)) if (!RESERVED.includes(name)) search.set(name, value);
  if (words) search.set('words', words);
  else search.set('checks', checks);
  if (!words && transforms && transforms.length > 0) search.set('transforms', JSON.stringify(transforms));
  return `?${search}`;
}

/** Reads an address; what it leaves open stays open. */
export function choiceFromSearch(search: string): Partial<Choice> & { params: Record<string, string> } {
  const given = new URLSearchParams(search);
  const checks = given.get('checks');
  const words = given.get('words');
  const transforms = transformsFrom(given.get('transforms'));
  return {
    ...(given.has('family') && { family: given.get('family')! }),
    ...((checks === 'blocks' || checks === 'points') && { checks }),
    ...((words === 'blocks' || words === 'complements') && { words }),
    ...(transforms && { transforms }),
    params: Object.fromEntries([...given].filter(([name]) => !RESERVED.includes(name))),
  };
}

function transformsFrom(text: string | null): Transform[] | null {
  if (!text) return null;
  try {
    const given: unknown = JSON.parse(text);
    return Array.isArray(given) && given.every((step) => typeof step?.kind === 'string') ? given : null;
  } catch {
    return null;
  }
}

export function derivationOf({ checks, words, transforms }: Choice): SheetRequest['derivation'] {
  if (words) return { kind: 'constant-weight', ...(words === 'complements' && { complement: true }) };
  return { kind: 'ldpc', checks, ...(transforms && transforms.length > 0 && { transforms }) };
}
