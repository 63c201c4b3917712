import { type Context, nowText } from '../../context.ts';
import type { Database } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { Refusal } from '../../refusal.ts';
import { findSource, insertSource, type Source } from '../../repositories/sources.ts';

/** The source as which a person's tab or script computes: by the name it gives itself, else one a person.
 *  @throws Refusal when its results were set aside. */
export async function sourceOfCaller(
  { db, caller }: Context,
  named: { name: string; label: string } | undefined,
): Promise<Source> {
  const kind = named ? 'browser' : 'script';
  const label = named ? `${named.label}, ${caller.name}` : `a script of ${caller.name}`;
  const source = await sourceNamed(db, { kind, userId: caller.id, name: named?.name ?? 'script', label });
  refuseQuarantined(source);
  return source;
}

export const sourceOfServer = (db: Database): Promise<Source> =>
  sourceNamed(db, { kind: 'server', userId: null, name: 'server', label: 'this server' });

export const sourceOfMachine = (db: Database, name: string): Promise<Source> =>
  sourceNamed(db, { kind: 'fleet', userId: null, name, label: name });

async function sourceNamed(db: Database, key: Pick<Source, 'kind' | 'userId' | 'name' | 'label'>): Promise<Source> {
  const known = await findSource(db, key);
  if (known) return known;
  const source = { ...key, id: newId(), createdAt: nowText() };
  await insertSource(db, source);
  return { ...source, quarantinedAt: null };
}

export function refuseQuarantined({ label, quarantinedAt }: Source): void {
  if (quarantinedAt === null) return;
  const message =
    `Results of ${label} were found wrong and set aside at ${quarantinedAt}; nothing more is taken from it. ` +
    'Another browser, the server or the fleet can go on.';
  throw new Refusal('quarantined', message);
}
