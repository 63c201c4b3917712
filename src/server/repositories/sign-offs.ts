import type { SignOff } from '@/api/sign-offs.ts';
import type { Database } from '../db/database.ts';
import type { Addressee } from './notices.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface NewSignOffRow {
  id: string;
  projectId: string;
  codeId: string;
  note: string;
  /** JSON text, kept to the byte. */
  snapshot: string;
  digest: string;
  createdBy: string;
  createdAt: string;
}

export async function insertSignOff(db: Database, signOff: NewSignOffRow): Promise<void> {
  await db('sign_offs').insert({
    id: signOff.id,
    project_id: signOff.projectId,
    code_id: signOff.codeId,
    note: signOff.note,
    snapshot: signOff.snapshot,
    digest: signOff.digest,
    created_by: signOff.createdBy,
    created_at: signOff.createdAt,
  });
}

export async function insertDecision(
  db: Database,
  decision: {
    signOffId: string;
    outcome: 'approved' | 'returned';
    reason: string;
    createdBy: string;
    createdAt: string;
  },
): Promise<void> {
  await db('sign_off_decisions').insert({
    sign_off_id: decision.signOffId,
    outcome: decision.outcome,
    reason: decision.reason,
    created_by: decision.createdBy,
    created_at: decision.createdAt,
  });
}

/** Everything but the snapshot. */
const shown = (db: Database) =>
  db('sign_offs')
    .join('users as asker', 'asker.id', 'sign_offs.created_by')
    .join('codes', 'codes.id', 'sign_offs.code_id')
    .leftJoin('sign_off_decisions as decision', 'decision.sign_off_id', 'sign_offs.id')
    .leftJoin('users as decider', 'decider.id', 'decision.created_by')
    .select(
      ...['id', 'project_id', 'code_id', 'note', 'digest', 'created_by', 'created_at'].map(
        (column) => `sign_offs.${column}`,
      ),
      'codes.name as code_name',
      'asker.name as asker',
      ...['outcome', 'reason', 'created_at'].map((column) => `decision.${column} as decision_${column}`),
      'decider.name as decider',
    );

/** @param userId The reader, who may have asked for it. */
export async function signOffById(db: Database, id: string, userId: string): Promise<SignOff | undefined> {
  const row = await shown(db).where('sign_offs.id', id).first();
  return row && toSignOff(row, userId);
}

/** Sign-offs of a project, newest first. */
export async function signOffsOf(
  db: Database,
  projectId: string,
  userId: string,
  page: PageRequest,
): Promise<SignOff[]> {
  const query = shown(db).where('sign_offs.project_id', projectId).orderBy('sign_offs.id', 'desc').limit(page.limit);
  if (page.after) query.where('sign_offs.id', '<', page.after);
  return (await query).map((row) => toSignOff(row, userId));
}

export async function snapshotOf(db: Database, id: string): Promise<string | undefined> {
  return (await db('sign_offs').where({ id }).first('snapshot'))?.snapshot;
}

export async function snapshotByDigest(db: Database, digest: string): Promise<string | undefined> {
  return (await db('sign_offs').where({ digest }).first('snapshot'))?.snapshot;
}

/** The latest decision on a code, if it is an approval: a later return takes an approval back. */
export async function approvalOf(db: Database, codeId: string): Promise<SignOff | undefined> {
  const row = await shown(db)
    .where('sign_offs.code_id', codeId)
    .whereNotNull('decision.outcome')
    .orderBy('decision.created_at', 'desc')
    .orderBy('sign_offs.id', 'desc')
    .first();
  return row?.decision_outcome === 'approved' ? toSignOff(row, '') : undefined;
}

export async function signOffsOfCode(db: Database, codeId: string): Promise<number> {
  const row = await db('sign_offs').where({ code_id: codeId }).count({ all: '*' }).first();
  return Number(row?.all ?? 0);
}

/** Members of a project who may decide, but for one of them. */
export async function decidersBut(db: Database, projectId: string, userId: string): Promise<Addressee[]> {
  return db('memberships')
    .join('users', 'users.id', 'memberships.user_id')
    .where('memberships.project_id', projectId)
    .whereIn('memberships.role', ['owner', 'reviewer'])
    .whereNot('users.id', userId)
    .select('users.id', 'users.email', 'users.name');
}

/** Who asked for a sign-off, as long as that person belongs to its project. */
export async function askerOf(db: Database, signOffId: string): Promise<Addressee | undefined> {
  return db('sign_offs')
    .join('users', 'users.id', 'sign_offs.created_by')
    .join('memberships', (on) => {
      on.on('memberships.project_id', 'sign_offs.project_id').andOn('memberships.user_id', 'users.id');
    })
    .where('sign_offs.id', signOffId)
    .first('users.id', 'users.email', 'users.name');
}

function toSignOff(row: Row, userId: string): SignOff {
  return {
    id: row.id!,
    projectId: row.project_id!,
    codeId: row.code_id!,
    codeName: row.code_name!,
    note: row.note!,
    state: row.decision_outcome ?? 'open',
    digest: row.digest!,
    askedBy: row.asker!,
    askedAt: row.created_at!,
    isOwn: row.created_by === userId,
    decision: row.decision_outcome
      ? { reason: row.decision_reason!, by: row.decider!, at: row.decision_created_at! }
      : null,
  };
}
