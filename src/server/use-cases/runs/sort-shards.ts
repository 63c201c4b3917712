import { isDeepStrictEqual } from 'node:util';
import type { Tally } from '@/core/simulation/tally.ts';
import type { Database } from '../../db/database.ts';
import { type StoredShard, storedTallies } from '../../repositories/shards.ts';

export type Shard = StoredShard;

export interface SortedShards {
  fresh: Shard[];
  duplicates: number;
  conflicts: { posted: Shard; stored: Tally }[];
}

/** Tells shards that are new from those stored already, or earlier in the same batch. */
export async function sortShards(db: Database, shards: readonly Shard[]): Promise<SortedShards> {
  const known = await storedTallies(db, shards);
  const sorted: SortedShards = { fresh: [], duplicates: 0, conflicts: [] };
  for (const posted of shards) {
    const key = `${posted.pointId} ${posted.index}`;
    const stored = known.get(key);
    if (!stored) {
      known.set(key, posted.tally);
      sorted.fresh.push(posted);
    } else if (isDeepStrictEqual(stored, posted.tally)) sorted.duplicates++;
    else sorted.conflicts.push({ posted, stored });
  }
  return sorted;
}
