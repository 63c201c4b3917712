/** A page of a list by key: at most `limit` items that come after the item `after`. */
export interface PageRequest {
  after?: string;
  limit: number;
}

const usualLimit = 50;

/** Asks for one item more than wanted, to learn whether there is a next page. */
export const pageRequest = (query: { after?: string; limit?: number }): PageRequest => ({
  ...(query.after !== undefined && { after: query.after }),
  limit: (query.limit ?? usualLimit) + 1,
});

/** Takes the extra item off again and names the key of the next page. */
export function pageOf<T extends { id: string }>(items: T[], request: PageRequest): { items: T[]; next?: string } {
  if (items.length < request.limit) return { items };
  const kept = items.slice(0, request.limit - 1);
  return { items: kept, next: kept.at(-1)!.id };
}
