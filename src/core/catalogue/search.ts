import type { Transform } from '../codes/ldpc.ts';
import { families } from '../designs/families/index.ts';
import { ParamError } from '../errors.ts';
import type { Enclosure } from '../evidence.ts';
import type { CatalogueColumns, OrderColumn } from './columns.ts';
import type { Entry } from './entry.ts';
import { Fit } from './fit.ts';
import { type CatalogueQuery, parseQuery } from './query.ts';
import { type Requirement, requirementsOf, type Verdict } from './requirements.ts';
import { catalogueTable } from './table.ts';

/** A code that could be built, with what closed formulas say of it and of each requirement. Where shortening is settled it
 *  is one of the transforms, and n is the length after it; where the rank is only bounded the code must be built first,
 *  and `shortenBy` says between what. */
export interface Candidate extends Entry {
  /** Names the candidate in links: family, parameters, orientation, classes kept, bits dropped. */
  id: string;
  transforms: Transform[];
  /** Information positions to drop for the payload or the length asked for; absent when none was asked for. */
  shortenBy?: Enclosure;
  verdicts: Verdict[];
}

export interface SearchResult {
  candidates: Candidate[];
  /** Entries that no requirement rules out, and entries in all. */
  matching: number;
  total: number;
}

/** Candidates that no stated requirement rules out, sorted, 200 unless `limit` says otherwise; nothing is built.
 *  @throws ParamError naming the part of the query that is wrong. */
export const searchCatalogue = (query: CatalogueQuery): Candidate[] => searchTable(catalogueTable(), query).candidates;

/** The same with its counts, over any table. */
export function searchTable(table: CatalogueColumns, raw: CatalogueQuery): SearchResult {
  const query = parseQuery(raw);
  const asked = new Search(table, query);
  const rows = asked.matching();
  const { offset = 0, limit = 200 } = query;
  const candidates = Array.from(rows.subarray(offset, offset + limit), (row) => asked.candidate(row));
  return { candidates, matching: rows.length, total: table.count };
}

/** One query over one table. */
export class Search {
  readonly fit: Fit;
  readonly requirements: Requirement[];

  constructor(
    private readonly table: CatalogueColumns,
    private readonly query: CatalogueQuery,
  ) {
    this.fit = new Fit(table, query);
    this.requirements = requirementsOf(query, table, this.fit);
  }

  /** Rows that no requirement rules out, in the order asked for. */
  matching(): Uint32Array {
    const { column, isDescending } = this.order();
    const order = this.table.order(column);
    const isWanted = this.familiesWanted();
    const outcomes = this.requirements.map(({ outcome }) => outcome);
    const found = new Uint32Array(order.length);
    let size = 0;
    for (let at = 0; at < order.length; at++) {
      const row = order[isDescending ? order.length - 1 - at : at]!;
      if (isWanted && !isWanted(row)) continue;
      let isLeft = true;
      for (let i = 0; isLeft && i < outcomes.length; i++) isLeft = outcomes[i]!(row) !== 'misses';
      if (isLeft) found[size++] = row;
    }
    const left = found.subarray(0, size);
    return this.query.meetsFirst ? this.meetingFirst(left) : left;
  }

  /** Those that meet every requirement before those of which formulas leave something open, each part in its order. */
  private meetingFirst(rows: Uint32Array): Uint32Array {
    const meets = (row: number) => this.requirements.every(({ outcome }) => outcome(row) === 'meets');
    const isOpen = new Uint8Array(rows.length);
    const sorted = new Uint32Array(rows.length);
    let size = 0;
    for (let at = 0; at < rows.length; at++) {
      if (meets(rows[at]!)) sorted[size++] = rows[at]!;
      else isOpen[at] = 1;
    }
    for (let at = 0; at < rows.length; at++) if (isOpen[at] === 1) sorted[size++] = rows[at]!;
    return sorted;
  }

  /** The column whose order is that of the figure asked for. Once a payload or a length fixes part of a code, the rest of
   *  its figures follow its rank. */
  private order(): { column: OrderColumn; isDescending: boolean } {
    const { sort = 'n', descending: isDescending = false } = this.query;
    if (this.fit.isAsked && (sort === 'k' || sort === 'rate'))
      return { column: 'rankUpper', isDescending: !isDescending };
    if (sort === 'n' && this.fit.isAsked) return { column: 'parity', isDescending };
    return { column: sort, isDescending };
  }

  private familiesWanted(): ((row: number) => boolean) | undefined {
    const { families: wanted } = this.query;
    const known = families.map(({ id }) => id);
    const unknown = wanted?.find((id) => !known.includes(id));
    if (unknown !== undefined) throw new ParamError('families', unknown, `ids of families: ${known.join(', ')}`);
    return wanted && this.table.ofFamilies(new Set(wanted));
  }

  /** A row as a candidate, with its name, its transforms and a verdict on each requirement. */
  candidate(row: number): Candidate {
    const entry = this.table.entry(row);
    const { design, checks, keptClasses } = entry;
    const shortened = this.fit.isAsked ? this.fit.settledShortening(row) : undefined;
    const transforms: Transform[] = [
      ...(keptClasses === undefined ? [] : [{ kind: 'keep-classes', classes: keptClasses }]),
      ...(shortened ? [{ kind: 'shorten', bits: shortened }] : []),
    ];
    const params = Object.entries(design.params).map(
      ([name, value]) => `${name}=${typeof value === 'object' ? JSON.stringify(value) : value}`,
    );
    const choices = [
      ...(keptClasses === undefined ? [] : [`classes=${keptClasses}`]),
      ...(shortened ? [`shorten=${shortened}`] : []),
    ];
    return {
      ...entry,
      ...(shortened && afterShortening(entry, shortened)),
      id: [design.family, ...params, checks, ...choices].join(';'),
      transforms,
      ...(this.fit.isAsked && { shortenBy: this.fit.shortening(row) }),
      verdicts: this.requirements.map(({ name, outcome, grounds }) => ({
        requirement: name,
        outcome: outcome(row),
        ...grounds(entry),
      })),
    };
  }
}

/** The distance is kept or raised, cycles only break, and rows lose the bits dropped; the rest stays. */
function afterShortening({ n, rank, girth, distance }: Entry, bits: number): Pick<Entry, 'n' | 'girth' | 'distance'> {
  const most = Math.max(distance.lower, Math.min(n - bits, rank.upper + 1));
  return {
    n: n - bits,
    girth: { ...girth, method: `${girth.method}, before shortening, which only breaks cycles` },
    distance: {
      lower: distance.lower,
      upper: most,
      grade: distance.lower === most ? distance.grade : 'bounded',
      method: `${distance.method}, before shortening, which keeps or raises it`,
    },
  };
}
