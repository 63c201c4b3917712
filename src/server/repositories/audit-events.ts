import { type Context, nowText } from '../context.ts';
import type { Database } from '../db/database.ts';
import { newId } from '../ids.ts';

export interface AuditEvent {
  projectId: string | null;
  /** What happened, e.g. `code.created`, `shard.conflict`. */
  kind: string;
  /** Id of what it happened to. */
  subject: string;
  content?: Record<string, unknown>;
}

/** Records who did what; within the transaction of the deed itself. */
export async function recordEvent(db: Database, caller: Pick<Context['caller'], 'id'>, event: AuditEvent) {
  await db('audit_events').insert({
    id: newId(),
    at: nowText(),
    user_id: caller.id,
    project_id: event.projectId,
    kind: event.kind,
    subject: event.subject,
    content: JSON.stringify(event.content ?? {}),
  });
}
