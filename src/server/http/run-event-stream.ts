import { runEventSchema } from '@/api/runs.ts';
import { identify } from '../auth/identity.ts';
import type { Context } from '../context.ts';
import type { Database } from '../db/database.ts';
import { runEvents } from '../events/run-events.ts';
import { notFound } from '../refusal.ts';
import { roleIn } from '../repositories/memberships.ts';
import { revisionOfRun } from '../repositories/runs.ts';
import { runNews } from '../use-cases/runs/run-news.ts';
import { eventStream, eventText } from './event-stream.ts';

const settleMs = 250;

/** Server-sent events of one run: its state at once, then after each commit that changes it, at most four a second.
 *  The id of an event is the run's revision, so whoever reconnects with Last-Event-ID gets the points that changed
 *  meanwhile and no others. Rights are checked afresh for every event.
 *  @param since the revision that the watcher has seen already. */
export function runEventStream(
  { db, caller }: Context,
  runId: string,
  since: number | undefined,
  request: Request,
): ReadableStream<Uint8Array> {
  let seen = lastEventId(request) ?? since;
  let told = false;
  const tell = async () => {
    const now = await revisionOfRun(db, runId);
    // The session may have ended, the token been revoked and the project no longer be shared since.
    const stands = now && (await identify(db, request)) && (await roleIn(db, now.projectId, caller.id));
    if (!stands) throw notFound('run');
    if (told && now.revision === seen) return null;
    const news = await sharedNews(db, runId, seen, now.revision);
    seen = news.revision;
    told = true;
    return news.text;
  };
  return eventStream({ watch: (changed) => runEvents.watch(runId, changed), tell, settleMs }, request.signal);
}

function lastEventId(request: Request): number | undefined {
  const text = request.headers.get('last-event-id') ?? '';
  return /^\d{1,15}$/.test(text) ? Number(text) : undefined;
}

interface News {
  revision: number;
  text: string;
}

/** Events of this moment: those who watch together have seen the same and are told the same, and it is read and
 *  written out once for all of them. */
const atHand = new Map<string, Promise<News>>();
const keptMs = 1000;

function sharedNews(db: Database, runId: string, since: number | undefined, revision: number): Promise<News> {
  const key = `${runId} ${since} ${revision}`;
  const known = atHand.get(key);
  if (known) return known;
  const news = readNews(db, runId, since);
  atHand.set(key, news);
  setTimeout(() => atHand.delete(key), keptMs).unref();
  return news;
}

async function readNews(db: Database, runId: string, since: number | undefined): Promise<News> {
  const news = runEventSchema.parse(await runNews(db, runId, since));
  return { revision: news.run.revision, text: eventText('run', news, String(news.run.revision)) };
}
