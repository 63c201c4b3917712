import type { Notice, NoticeKind } from '@/api/notices.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

export interface NewNotice extends Omit<Notice, 'readAt'> {
  userId: string;
  projectId: string | null;
}

export async function insertNotice(db: Database, notice: NewNotice): Promise<void> {
  await db('notices').insert({
    id: notice.id,
    user_id: notice.userId,
    project_id: notice.projectId,
    kind: notice.kind,
    title: notice.title,
    text: notice.text,
    path: notice.path,
    created_at: notice.createdAt,
  });
}

/** A person's notices, newest first. */
export async function noticesOf(db: Database, userId: string, page: PageRequest): Promise<Notice[]> {
  const query = db('notices').where({ user_id: userId }).orderBy('id', 'desc').limit(page.limit);
  if (page.after) query.where('id', '<', page.after);
  return (await query).map(toNotice);
}

export async function unreadCount(db: Database, userId: string): Promise<number> {
  const row = await db('notices').where({ user_id: userId, read_at: null }).count({ unread: '*' }).first();
  return Number(row?.unread ?? 0);
}

/** @returns whether there is such a notice of that person. */
export async function setNoticeRead(db: Database, userId: string, id: string, readAt: string | null): Promise<boolean> {
  return (await db('notices').where({ id, user_id: userId }).update({ read_at: readAt })) > 0;
}

export async function setAllRead(db: Database, userId: string, readAt: string): Promise<void> {
  await db('notices').where({ user_id: userId, read_at: null }).update({ read_at: readAt });
}

/** What a person chose, kind by kind; kinds not chosen about are missing. */
export async function choicesOf(db: Database, userId: string): Promise<Map<string, boolean>> {
  const rows = await db('notice_choices').where({ user_id: userId });
  return new Map(rows.map((row) => [row.kind, row.by_mail === 1]));
}

export async function saveChoice(db: Database, userId: string, kind: NoticeKind, byMail: boolean): Promise<void> {
  const row = { by_mail: byMail ? 1 : 0 };
  await db('notice_choices')
    .insert({ user_id: userId, kind, ...row })
    .onConflict(['user_id', 'kind'])
    .merge(row);
}

export interface Addressee {
  id: string;
  email: string;
  name: string;
}

export async function addressee(db: Database, userId: string): Promise<Addressee | undefined> {
  return db('users').where({ id: userId }).first('id', 'email', 'name');
}

/** Who stated a run, as long as that person belongs to its project. */
export async function ownerOfRun(db: Database, runId: string): Promise<Addressee | undefined> {
  return db('runs')
    .join('users', 'users.id', 'runs.created_by')
    .join('memberships', (on) => {
      on.on('memberships.project_id', 'runs.project_id').andOn('memberships.user_id', 'users.id');
    })
    .where('runs.id', runId)
    .first('users.id', 'users.email', 'users.name');
}

function toNotice(row: Row): Notice {
  return {
    id: row.id!,
    kind: row.kind!,
    title: row.title!,
    text: row.text!,
    path: row.path!,
    createdAt: row.created_at!,
    readAt: row.read_at ?? null,
  };
}
