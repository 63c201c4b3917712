import type { Requirements } from '@/api/projects.ts';
import { wholeNumber } from '@/components/ui/numbers.ts';
import { type Filters, windowNames } from './filters.ts';

/** The window that a project's requirements ask for. */
export function filtersFrom(requirements: Requirements): Filters {
  const { lengthMin, lengthMax, rateMin, columnWeightMax, structure, payloadBits, parityBits, channel, targetFer } =
    requirements;
  const window = (min?: number, max?: number) =>
    min === undefined && max === undefined ? undefined : `${min ?? ''}..${max ?? ''}`;
  const filters: Filters = {
    n: window(lengthMin, lengthMax),
    rate: window(rateMin),
    columnWeight: window(undefined, columnWeightMax),
    structure: structure === 'any' ? undefined : structure,
    payloadBits: fitsOneWord(requirements) ? text(payloadBits) : undefined,
    parityBits: text(parityBits),
    // Each says something of a code only together with the other.
    ...(channel?.kind === 'bsc' && targetFer !== undefined && { p: String(channel.p), targetFer: String(targetFer) }),
  };
  return Object.fromEntries(Object.entries(filters).filter(([, value]) => value !== undefined));
}

const text = (value: number | undefined) => (value === undefined ? undefined : String(value));

const fitsOneWord = ({ payloadBits, lengthMax }: Requirements) =>
  payloadBits === undefined || lengthMax === undefined || payloadBits <= lengthMax;

/** What the requirements state that formulas cannot search by, in words. */
export function leftOut(requirements: Requirements): string[] {
  const { payloadBits, lengthMax, channel, targetBer, targetFer, targetUber } = requirements;
  const targets = [
    targetBer !== undefined && 'BER',
    targetFer !== undefined && 'FER',
    targetUber !== undefined && 'UBER',
  ];
  const isSearched = channel?.kind === 'bsc' && targetFer !== undefined;
  const open = targets.filter((name) => name && !(name === 'FER' && isSearched));
  return [
    ...(fitsOneWord(requirements)
      ? []
      : [
          `the payload of ${wholeNumber(payloadBits!)} bits, which takes several words of at most ${wholeNumber(lengthMax!)}`,
        ]),
    ...(open.length > 0 ? [`the target ${open.join(' and ')}, which runs measure`] : []),
  ];
}

/** Whether the window is the one that the requirements ask for; the order does not matter. */
export function isFromRequirements(filters: Filters, requirements: Requirements): boolean {
  const asked = filtersFrom(requirements);
  return windowNames.every((name) => (filters[name] ?? '') === (asked[name] ?? ''));
}
