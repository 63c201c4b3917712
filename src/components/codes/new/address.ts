/** What is to be built, as typed: parameters stay text until the engine judges them. */
export interface Choice {
  family: string;
  params: Record<string, string>;
  checks: 'blocks' | 'points';
}

const RESERVED = ['family', 'checks'];

/** The choice in an address: ?family=projective-plane&q=16&checks=blocks. */
export function choiceToSearch({ family, params, checks }: Choice): string {
  const search = new URLSearchParams({ family });
  for (const [name, value] of Object.entries(params)) if (!RESERVED.includes(name)) search.set(name, value);
  search.set('checks', checks);
  return `?${search}`;
}

/** Reads an address; what it leaves open stays open. */
export function choiceFromSearch(search: string): Partial<Choice> & { params: Record<string, string> } {
  const given = new URLSearchParams(search);
  const checks = given.get('checks');
  return {
    ...(given.has('family') && { family: given.get('family')! }),
    ...((checks === 'blocks' || checks === 'points') && { checks }),
    params: Object.fromEntries([...given].filter(([name]) => !RESERVED.includes(name))),
  };
}
