import useSWRInfinite from 'swr/infinite';
import type { z } from 'zod';
import type { CandidateRow, catalogueAnswerSchema } from '@/api/catalogue.ts';
import { endpoints } from '@/api/endpoints.ts';
import { type ApiFailure, addressOf, call } from '@/client/api.ts';
import type { CatalogueParams } from './filters.ts';

type Answer = z.output<typeof catalogueAnswerSchema>;
const pageSize = 250;

export interface Candidates {
  rows: readonly CandidateRow[];
  matching: number | null;
  total: number | null;
  nearest: Answer['nearest'];
  obstacles: Answer['obstacles'];
  failure: ApiFailure | undefined;
  isLoading: boolean;
  /** Asks for the next page, when there is one. */
  more(): void;
}

/** The catalogue's answer, fetched page by page as the table is read; the last answer stays while the next is on its way.
 *  Null waits. */
export function useCandidates(query: CatalogueParams | null): Candidates {
  const pageOf = (offset: number) => ({ query: { ...query, limit: pageSize, offset } as CatalogueParams });
  const { data, error, isLoading, size, setSize } = useSWRInfinite<Answer, ApiFailure>(
    (page, previous: Answer | null) =>
      query === null || (previous && previous.next === undefined)
        ? null
        : addressOf(endpoints.searchCatalogue, pageOf(page * pageSize)),
    (address: string) => {
      const offset = Number(new URLSearchParams(address.split('?')[1]).get('offset') ?? 0);
      return call(endpoints.searchCatalogue, pageOf(offset));
    },
    { keepPreviousData: true, revalidateFirstPage: false, revalidateOnFocus: false },
  );
  const first = data?.[0];
  return {
    rows: data?.flatMap(({ candidates }) => candidates) ?? [],
    matching: first?.matching ?? null,
    total: first?.total ?? null,
    nearest: first?.nearest ?? [],
    obstacles: first?.obstacles ?? [],
    failure: error,
    isLoading,
    more: () => {
      if (data?.at(-1)?.next !== undefined && data.length === size) void setSize(size + 1);
    },
  };
}
