import type { SignOffComment } from '@/api/sign-offs.ts';
import type { Database } from '../db/database.ts';
import type { Addressee } from './notices.ts';

export interface NewCommentRow {
  id: string;
  signOffId: string;
  about: SignOffComment['about'];
  text: string;
  createdBy: string;
  createdAt: string;
}

export async function insertComment(db: Database, comment: NewCommentRow): Promise<void> {
  await db('sign_off_comments').insert({
    id: comment.id,
    sign_off_id: comment.signOffId,
    about: JSON.stringify(comment.about),
    text: comment.text,
    created_by: comment.createdBy,
    created_at: comment.createdAt,
  });
}

export async function commentCount(db: Database, signOffId: string): Promise<number> {
  const row = await db('sign_off_comments').where({ sign_off_id: signOffId }).count({ all: '*' }).first();
  return Number(row?.all ?? 0);
}

/** Oldest first. */
export async function commentsOf(db: Database, signOffId: string): Promise<SignOffComment[]> {
  const rows = await db('sign_off_comments')
    .join('users', 'users.id', 'sign_off_comments.created_by')
    .where({ sign_off_id: signOffId })
    .orderBy('sign_off_comments.id')
    .select('sign_off_comments.*', 'users.name as author');
  return rows.map((row) => ({
    id: row.id,
    about: JSON.parse(row.about),
    text: row.text,
    by: row.author,
    at: row.created_at,
  }));
}

/** Who asked, and who spoke before, as long as they belong to the project; but for one of them. */
export async function inConversation(db: Database, signOffId: string, butUserId: string): Promise<Addressee[]> {
  const asker = db('sign_offs').where({ id: signOffId }).select('created_by');
  const speakers = db('sign_off_comments').where({ sign_off_id: signOffId }).select('created_by');
  return db('memberships')
    .join('users', 'users.id', 'memberships.user_id')
    .join('sign_offs', 'sign_offs.project_id', 'memberships.project_id')
    .where('sign_offs.id', signOffId)
    .where((either) => either.whereIn('users.id', asker).orWhereIn('users.id', speakers))
    .whereNot('users.id', butUserId)
    .select('users.id', 'users.email', 'users.name');
}
