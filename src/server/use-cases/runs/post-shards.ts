import type { z } from 'zod';
import type { shardBatchSchema } from '@/api/runs.ts';
import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { runEvents } from '../../events/run-events.ts';
import { runById } from '../../repositories/runs.ts';
import { runToWrite } from './run-access.ts';
import { sourceOfCaller } from './source-of-caller.ts';
import { type Receipt, storeShards } from './store-shards.ts';

/** Takes in computed shards: all of a batch in one transaction, answered once it is committed. */
export async function postShards(
  context: Context,
  runId: string,
  { shards, source: named }: z.output<typeof shardBatchSchema>,
): Promise<Receipt> {
  await runToWrite(context, runId);
  const receipt = await inTransaction(context.db, async (trx) => {
    const source = await sourceOfCaller({ ...context, db: trx }, named);
    return storeShards(trx, (await runById(trx, runId))!, shards, { userId: context.caller.id, source });
  });
  if (receipt.accepted > 0) runEvents.changed(runId);
  return receipt;
}
