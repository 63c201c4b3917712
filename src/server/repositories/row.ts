/** A row as the query builder hands it over, without types of its own. The migrations' STRICT columns are what holds
 *  its values to the shape that each repository gives out. */
export type Row = Record<string, never>;
