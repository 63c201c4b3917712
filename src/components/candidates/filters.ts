import type { z } from 'zod';
import { catalogueQueryParams } from '@/api/catalogue.ts';
import type { endpoints } from '@/api/endpoints.ts';
import type { Requirements } from '@/api/projects.ts';
import type { CallInput } from '@/client/api.ts';

export type CatalogueParams = NonNullable<CallInput<typeof endpoints.searchCatalogue>['query']>;

/** The filter's fields in the order shown; each is a parameter of the address and of the catalogue's own query. */
export const filterFields = [
  { name: 'n', label: 'length n', hint: '200..1100' },
  { name: 'k', label: 'dimension k', hint: '500..' },
  { name: 'rate', label: 'rate', hint: '0.8..' },
  { name: 'columnWeight', label: 'column weight', hint: '..33' },
  { name: 'girthMin', label: 'girth, least', hint: '6' },
  { name: 'distanceMin', label: 'distance, least', hint: '10' },
  { name: 'radiusMin', label: 'radius, least', hint: '8' },
  { name: 'payloadBits', label: 'payload bits', hint: '512' },
  { name: 'parityBits', label: 'parity bits', hint: '82' },
  { name: 'p', label: 'raw p', hint: '0.004' },
  { name: 'targetFer', label: 'target FER', hint: '1e-9' },
] as const;

export type FilterName = (typeof filterFields)[number]['name'];
export const choiceNames = ['structure', 'resolvable', 'families', 'sort', 'descending'] as const;
export type ChoiceName = (typeof choiceNames)[number];
export type Filters = Partial<Record<FilterName | ChoiceName, string>>;

/** What the address says, as the query of the API, and a message for each field that it cannot read. */
export function queryFrom(filters: Filters): { query: CatalogueParams; errors: Partial<Record<string, string>> } {
  const stated = Object.fromEntries(Object.entries(filters).filter(([, text]) => text !== undefined && text !== ''));
  const parsed = catalogueQueryParams.safeParse(stated);
  if (parsed.success) return { query: stated as CatalogueParams, errors: {} };
  const errors = Object.fromEntries(parsed.error.issues.map((issue) => [String(issue.path[0]), acceptedBy(issue)]));
  const readable = Object.entries(stated).filter(([name]) => !(name in errors));
  return { query: Object.fromEntries(readable) as CatalogueParams, errors };
}

const acceptedBy = (issue: z.core.$ZodIssue) => (issue.message.startsWith('Invalid') ? 'a number' : issue.message);

/** The filter that a project's requirements ask for. */
export function filtersFrom(requirements: Requirements): Filters {
  const { lengthMin, lengthMax, rateMin, columnWeightMax, structure, payloadBits, parityBits, channel, targetFer } =
    requirements;
  const window = (min?: number, max?: number) =>
    min === undefined && max === undefined ? undefined : `${min ?? ''}..${max ?? ''}`;
  return {
    n: window(lengthMin, lengthMax),
    rate: window(rateMin),
    columnWeight: window(undefined, columnWeightMax),
    structure: structure === 'any' ? undefined : structure,
    payloadBits: payloadBits === undefined ? undefined : String(payloadBits),
    parityBits: parityBits === undefined ? undefined : String(parityBits),
    p: channel?.kind === 'bsc' ? String(channel.p) : undefined,
    targetFer: targetFer === undefined ? undefined : String(targetFer),
  };
}
