import type { z } from 'zod';
import { catalogueQueryParams } from '@/api/catalogue.ts';
import type { endpoints } from '@/api/endpoints.ts';
import type { CallInput } from '@/client/api.ts';
import type { SortColumn } from '@/core/catalogue/query.ts';

export type CatalogueParams = NonNullable<CallInput<typeof endpoints.searchCatalogue>['query']>;

/** The filter's typed fields in the order shown; each is a parameter of the address and of the catalogue's own query.
 *  The first stand open, the others behind "more". */
export const filterFields = [
  { name: 'n', label: 'length n', hint: '200..1100', first: true },
  { name: 'rate', label: 'rate', hint: '0.8..', first: true },
  { name: 'distanceMin', label: 'distance, least', hint: '10', first: true },
  { name: 'girthMin', label: 'girth, least', hint: '6', first: true },
  { name: 'k', label: 'dimension k', hint: '500..', first: false },
  { name: 'radiusMin', label: 'radius, least', hint: '8', first: false },
  { name: 'columnWeight', label: 'column weight', hint: '..33', first: false },
  { name: 'rowWeight', label: 'row weight', hint: '..33', first: false },
  { name: 'payloadBits', label: 'payload bits', hint: '512', first: false },
  { name: 'parityBits', label: 'parity bits', hint: '82', first: false },
  { name: 'shortenTo', label: 'shorten to length', hint: '1000', first: false },
  { name: 'p', label: 'raw p', hint: '0.004', first: false },
  { name: 'targetFer', label: 'target FER', hint: '1e-9', first: false },
] as const;

export type FilterName = (typeof filterFields)[number]['name'];
/** Chosen from lists; with the typed fields they are the window of the search. */
export const choiceNames = ['structure', 'resolvable', 'families'] as const;
export const orderNames = ['sort', 'descending', 'mixed'] as const;
export type WindowName = FilterName | (typeof choiceNames)[number];
export type Filters = Partial<Record<WindowName | (typeof orderNames)[number], string>>;

export const windowNames: readonly WindowName[] = [...filterFields.map(({ name }) => name), ...choiceNames];

/** What is stated behind "more", in words. */
export function statedBehind(filters: Filters): string[] {
  const typed = filterFields
    .filter(({ first, name }) => !first && filters[name])
    .map(({ name, label }) => `${label} ${filters[name]}`);
  return [...typed, ...(filters.resolvable ? ['resolvable'] : []), ...(filters.families ? ['one family'] : [])];
}

/** What the address says, as the query of the API, and a message for each field that it cannot read. */
export function queryFrom(filters: Filters): { query: CatalogueParams; errors: Partial<Record<string, string>> } {
  const { sort, descending } = orderOf(filters);
  const { mixed, ...window } = filters;
  const order = { sort, ...(descending && { descending: 'true' }), ...(mixed !== 'true' && { meetsFirst: 'true' }) };
  const stated = Object.fromEntries(
    Object.entries({ ...window, ...order }).filter(([, text]) => text !== undefined && text !== ''),
  );
  const parsed = catalogueQueryParams.safeParse(stated);
  if (parsed.success) return { query: stated as CatalogueParams, errors: {} };
  const errors = Object.fromEntries(parsed.error.issues.map((issue) => [String(issue.path[0]), acceptedBy(issue)]));
  const readable = Object.entries(stated).filter(([name]) => !(name in errors));
  return { query: Object.fromEntries(readable) as CatalogueParams, errors };
}

const acceptedBy = (issue: z.core.$ZodIssue) => (issue.message.startsWith('Invalid') ? 'a number' : issue.message);

/** The order asked for. Unless one is, a search that fixes how much redundancy there may be shows the largest distance
 *  first, and any other the shortest code. */
export function orderOf(filters: Filters): { sort: SortColumn; descending: boolean } {
  if (filters.sort) return { sort: filters.sort as SortColumn, descending: filters.descending === 'true' };
  const bounded = filters.rate ?? filters.k ?? filters.payloadBits ?? filters.parityBits;
  return bounded ? { sort: 'distance', descending: true } : { sort: 'n', descending: false };
}
