import type { Code } from '@/api/codes.ts';
import type { NewRelease, Release, ReleaseFile } from '@/api/releases.ts';
import type { ReleaseFacts } from '@/core/release/bundle.ts';
import type { Database } from '../db/database.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

/** The facts that files are made from; the rest is only told. */
export interface CodeFacts extends ReleaseFacts {
  program: { name: string; version: string };
  code: Pick<Code, 'id' | 'name' | 'n' | 'k' | 'rows' | 'ones'>;
  lineage: Pick<Code, 'design' | 'designTitle' | 'derivation' | 'certificate'> & Record<string, unknown>;
  properties: Omit<Code['properties'][number], 'elapsedMs'>[];
  signOff: { digest: string } | null;
}

export interface NewReleaseRow {
  id: string;
  projectId: string;
  number: number;
  title: string;
  note: string;
  codeId: string;
  fingerprint: string;
  contents: NewRelease['contents'];
  facts: CodeFacts;
  signOff: string | null;
  createdBy: string;
  createdAt: string;
}

/** What the bundle was made from, to make it again. */
export type ReleaseSource = Pick<NewReleaseRow, 'contents' | 'facts'>;

/** Stores a release with its files; the bundle goes last and closes it. */
export async function insertRelease(
  db: Database,
  release: NewReleaseRow,
  files: readonly ReleaseFile[],
  bundle: ReleaseFile,
): Promise<void> {
  await db('releases').insert({
    id: release.id,
    project_id: release.projectId,
    number: release.number,
    title: release.title,
    note: release.note,
    code_id: release.codeId,
    fingerprint: release.fingerprint,
    contents: JSON.stringify(release.contents),
    facts: JSON.stringify(release.facts),
    sign_off: release.signOff,
    created_by: release.createdBy,
    created_at: release.createdAt,
  });
  for (const [position, file] of [...files, bundle].entries()) {
    await db('release_files').insert({
      release_id: release.id,
      position,
      name: file.name,
      title: file.title,
      media_type: file.mediaType,
      size_bytes: file.sizeBytes,
      sha256: file.sha256,
      is_bundle: file === bundle ? 1 : 0,
    });
  }
}

export async function lastReleaseNumber(db: Database, projectId: string): Promise<number> {
  const row = await db('releases').where({ project_id: projectId }).max({ last: 'number' }).first();
  return Number(row?.last ?? 0);
}

export async function releasesOfCode(db: Database, codeId: string): Promise<number> {
  const row = await db('releases').where({ code_id: codeId }).count({ all: '*' }).first();
  return Number(row?.all ?? 0);
}

const shown = (db: Database) =>
  db('releases')
    .join('users', 'users.id', 'releases.created_by')
    .join('codes', 'codes.id', 'releases.code_id')
    .join('release_files', (on) =>
      on.on('release_files.release_id', 'releases.id').andOnVal('release_files.is_bundle', 1),
    )
    .select(
      ...['id', 'project_id', 'number', 'title', 'note', 'code_id', 'fingerprint', 'sign_off', 'created_at'].map(
        (column) => `releases.${column}`,
      ),
      ...['name', 'media_type', 'size_bytes', 'sha256'].map((column) => `release_files.${column} as bundle_${column}`),
      ...['name', 'n', 'k'].map((column) => `codes.${column} as code_${column}`),
      'release_files.title as bundle_title',
      'users.name as author',
    );

export async function releaseById(db: Database, id: string): Promise<Release | undefined> {
  const row = await shown(db).where('releases.id', id).first();
  return row && (await withEndings(db, [row]))[0];
}

/** Releases of a project, newest first. */
export async function releasesOf(db: Database, projectId: string, page: PageRequest): Promise<Release[]> {
  const query = shown(db).where('releases.project_id', projectId).orderBy('releases.id', 'desc').limit(page.limit);
  if (page.after) query.where('releases.id', '<', page.after);
  return withEndings(db, await query);
}

export async function releaseSource(db: Database, id: string): Promise<ReleaseSource | undefined> {
  const row = await db('releases').where({ id }).first('contents', 'facts');
  return row && { contents: JSON.parse(row.contents), facts: JSON.parse(row.facts) };
}

/** Files in the order of the bundle, without the bundle itself. */
export async function filesOfRelease(db: Database, id: string): Promise<ReleaseFile[]> {
  const rows = await db('release_files').where({ release_id: id, is_bundle: 0 }).orderBy('position');
  return rows.map(toFile);
}

export async function releaseFile(db: Database, id: string, name: string): Promise<ReleaseFile | undefined> {
  const row = await db('release_files').where({ release_id: id, name }).first();
  return row && toFile(row);
}

export interface NewEndingRow {
  id: string;
  releaseId: string;
  kind: 'superseded' | 'withdrawn';
  reason: string;
  successorId: string | null;
  createdBy: string;
  createdAt: string;
}

export async function insertEnding(db: Database, ending: NewEndingRow): Promise<void> {
  await db('release_endings').insert({
    id: ending.id,
    release_id: ending.releaseId,
    kind: ending.kind,
    reason: ending.reason,
    successor_id: ending.successorId,
    created_by: ending.createdBy,
    created_at: ending.createdAt,
  });
}

async function withEndings(db: Database, rows: Row[]): Promise<Release[]> {
  const ids = rows.map((row): string => row.id!);
  const endings = await db('release_endings')
    .join('users', 'users.id', 'release_endings.created_by')
    .leftJoin('releases as successor', 'successor.id', 'release_endings.successor_id')
    .whereIn('release_endings.release_id', ids)
    .orderBy('release_endings.id')
    .select('release_endings.*', 'users.name as author', 'successor.number as successor_number');
  return rows.map((row) =>
    toRelease(
      row,
      endings.filter((ending) => ending.release_id === row.id),
    ),
  );
}

function toRelease(row: Row, endings: Row[]): Release {
  const kinds = endings.map((ending): string => ending.kind!);
  return {
    id: row.id!,
    projectId: row.project_id!,
    number: row.number!,
    title: row.title!,
    note: row.note!,
    codeId: row.code_id!,
    codeName: row.code_name!,
    n: row.code_n!,
    k: row.code_k!,
    fingerprint: row.fingerprint!,
    state: kinds.includes('withdrawn') ? 'withdrawn' : kinds.includes('superseded') ? 'superseded' : 'current',
    endings: endings.map((ending) => ({
      kind: ending.kind!,
      reason: ending.reason!,
      successor: ending.successor_id ? { id: ending.successor_id, number: ending.successor_number! } : null,
      by: ending.author!,
      at: ending.created_at!,
    })),
    signOff: row.sign_off ?? null,
    bundle: {
      name: row.bundle_name!,
      title: row.bundle_title!,
      mediaType: row.bundle_media_type!,
      sizeBytes: row.bundle_size_bytes!,
      sha256: row.bundle_sha256!,
    },
    createdBy: row.author!,
    createdAt: row.created_at!,
  };
}

const toFile = (row: Row): ReleaseFile => ({
  name: row.name!,
  title: row.title!,
  mediaType: row.media_type!,
  sizeBytes: row.size_bytes!,
  sha256: row.sha256!,
});
