import type { Knex } from 'knex';

/** Tokens by which scripts come in. Of the token itself only the SHA-256 is kept; being 256 random bits it needs no
 *  salt and no slow hash. */
const statements = [
  `CREATE TABLE api_tokens (
     id TEXT PRIMARY KEY NOT NULL,
     user_id TEXT NOT NULL REFERENCES users (id) ON DELETE CASCADE,
     name TEXT NOT NULL,
     scopes TEXT NOT NULL CHECK (json_valid(scopes)),
     digest TEXT NOT NULL UNIQUE CHECK (length(digest) = 64),
     ending TEXT NOT NULL,
     created_at TEXT NOT NULL,
     expires_at TEXT NOT NULL,
     last_used_at TEXT,
     revoked_at TEXT
   ) STRICT`,
  'CREATE INDEX api_tokens_user ON api_tokens (user_id, id)',
];

export async function up(knex: Knex): Promise<void> {
  for (const statement of statements) await knex.raw(statement);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('DROP TABLE api_tokens');
}
