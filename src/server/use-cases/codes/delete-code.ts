import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { Refusal } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { codesFrom, deleteCode as deleteRow, runsUsingCode } from '../../repositories/codes.ts';
import { releasesOfCode } from '../../repositories/releases.ts';
import { signOffsOfCode } from '../../repositories/sign-offs.ts';
import { codeToWrite } from './get-code.ts';

/** Removes a code; one that a run measures or a release holds stays, since they would lose their subject. */
export async function deleteCode(context: Context, codeId: string): Promise<void> {
  const { projectId, name, fingerprint } = await codeToWrite(context, codeId);
  await inTransaction(context.db, async (trx) => {
    const runs = await runsUsingCode(trx, codeId);
    if (runs > 0) {
      throw new Refusal(
        'in-use',
        `${runs === 1 ? 'One run measures' : `${runs} runs measure`} this code, so it stays.`,
      );
    }
    const releases = await releasesOfCode(trx, codeId);
    if (releases > 0) {
      const holding = releases === 1 ? 'One release holds' : `${releases} releases hold`;
      throw new Refusal('in-use', `${holding} this code, so it stays.`);
    }
    if ((await signOffsOfCode(trx, codeId)) > 0) {
      throw new Refusal('in-use', 'A sign-off was asked for on this code, so it stays.');
    }
    const derived = await codesFrom(trx, projectId, fingerprint);
    if (derived > 0) {
      const begin = derived === 1 ? 'One code begins' : `${derived} codes begin`;
      throw new Refusal('in-use', `${begin} from this uploaded matrix, so it stays.`);
    }
    await deleteRow(trx, codeId);
    const content = { name, fingerprint };
    await recordEvent(trx, context.caller, { projectId, kind: 'code.deleted', subject: codeId, content });
  });
}
