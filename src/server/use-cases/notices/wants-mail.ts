import type { NoticeKind } from '@/api/notices.ts';
import type { Database } from '../../db/database.ts';
import { choicesOf } from '../../repositories/notices.ts';

/** Until somebody chooses otherwise, everything comes by mail too. */
const unlessChosen = true;

export async function wantsMail(db: Database, userId: string, kind: NoticeKind): Promise<boolean> {
  return (await choicesOf(db, userId)).get(kind) ?? unlessChosen;
}
