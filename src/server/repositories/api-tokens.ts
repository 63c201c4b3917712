import type { Scope, Token } from '@/api/tokens.ts';
import type { Caller } from '../context.ts';
import type { Database } from '../db/database.ts';
import type { Row } from './row.ts';

export interface NewTokenRow extends Omit<Token, 'lastUsedAt'> {
  userId: string;
  digest: string;
}

export async function insertToken(db: Database, token: NewTokenRow): Promise<void> {
  await db('api_tokens').insert({
    id: token.id,
    user_id: token.userId,
    name: token.name,
    scopes: JSON.stringify(token.scopes),
    digest: token.digest,
    ending: token.ending,
    created_at: token.createdAt,
    expires_at: token.expiresAt,
  });
}

/** A person's tokens that were not revoked, newest first; expired ones among them. */
export async function tokensOf(db: Database, userId: string): Promise<Token[]> {
  const rows = await db('api_tokens').where({ user_id: userId, revoked_at: null }).orderBy('id', 'desc');
  return rows.map(toToken);
}

/** A token that was not revoked, when it is that person's. */
export async function tokenOf(db: Database, userId: string, id: string): Promise<Token | undefined> {
  const row = await db('api_tokens').where({ id, user_id: userId, revoked_at: null }).first();
  return row && toToken(row);
}

export async function revokeTokenRow(db: Database, id: string, at: string): Promise<void> {
  await db('api_tokens').where({ id }).update({ revoked_at: at });
}

export interface PresentedToken {
  id: string;
  owner: Caller;
  scopes: Scope[];
  expiresAt: string;
  lastUsedAt: string | null;
  revokedAt: string | null;
}

/** The token with that digest and its owner as the database says now; whether it still stands is for the caller to
 *  judge. */
export async function tokenByDigest(db: Database, digest: string): Promise<PresentedToken | undefined> {
  const row = await db('api_tokens')
    .join('users', 'users.id', 'api_tokens.user_id')
    .where({ digest })
    .first('api_tokens.*', 'users.email', 'users.name as owner_name', 'users.role');
  if (!row) return undefined;
  return {
    id: row.id,
    owner: { id: row.user_id, email: row.email, name: row.owner_name, role: row.role },
    scopes: JSON.parse(row.scopes),
    expiresAt: row.expires_at,
    lastUsedAt: row.last_used_at,
    revokedAt: row.revoked_at,
  };
}

export async function noteTokenUse(db: Database, id: string, at: string): Promise<void> {
  await db('api_tokens').where({ id }).update({ last_used_at: at });
}

function toToken(row: Row): Token {
  return {
    id: row.id!,
    name: row.name!,
    scopes: JSON.parse(row.scopes!),
    ending: row.ending!,
    createdAt: row.created_at!,
    expiresAt: row.expires_at!,
    lastUsedAt: row.last_used_at ?? null,
  };
}
