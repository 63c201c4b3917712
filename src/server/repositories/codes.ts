import { isDeepStrictEqual } from 'node:util';
import type { Code } from '@/api/codes.ts';
import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { Database } from '../db/database.ts';
import { packMatrix, unpackMatrix } from '../files/matrix-blob.ts';
import type { PageRequest } from './paging.ts';
import type { Row } from './row.ts';

/** The parts of a code's sheet that are shown, never queried. */
type Analysis = Pick<Code, 'certificate' | 'properties' | 'rowWeights' | 'columnWeights'>;

export interface NewCodeRow extends Analysis {
  id: string;
  projectId: string;
  name: string;
  design: Code['design'];
  designTitle: string;
  derivation: Code['derivation'];
  n: number;
  k: number;
  H: SparseMatrix;
  fingerprint: string;
  createdBy: string;
  createdAt: string;
}

export async function insertCode(db: Database, code: NewCodeRow): Promise<void> {
  const { certificate, properties, rowWeights, columnWeights } = code;
  const analysis: Analysis = { certificate, properties, rowWeights, columnWeights };
  await db('codes').insert({
    id: code.id,
    project_id: code.projectId,
    name: code.name,
    design: JSON.stringify(code.design),
    design_title: code.designTitle,
    derivation: JSON.stringify(code.derivation),
    n: code.n,
    k: code.k,
    row_count: code.H.rows,
    one_count: code.H.colIndex.length,
    fingerprint: code.fingerprint,
    matrix: packMatrix(code.H),
    analysis: JSON.stringify(analysis),
    created_by: code.createdBy,
    created_at: code.createdAt,
  });
}

/** Everything but the matrix. */
const shown = (db: Database) =>
  db('codes')
    .join('users', 'users.id', 'codes.created_by')
    .select(
      ...['id', 'project_id', 'name', 'design', 'design_title', 'derivation', 'n', 'k', 'row_count', 'one_count'].map(
        (column) => `codes.${column}`,
      ),
      ...['fingerprint', 'analysis', 'created_at'].map((column) => `codes.${column}`),
      'users.name as author',
    );

export async function codeById(db: Database, id: string): Promise<Code | undefined> {
  const row = await shown(db).where('codes.id', id).first();
  return row && toCode(row);
}

/** Codes of a project, newest first. */
export async function codesOf(db: Database, projectId: string, page: PageRequest): Promise<Code[]> {
  const query = shown(db).where('codes.project_id', projectId).orderBy('codes.id', 'desc').limit(page.limit);
  if (page.after) query.where('codes.id', '<', page.after);
  return (await query).map(toCode);
}

export async function codeIdByFingerprint(db: Database, projectId: string, fingerprint: string) {
  const row = await db('codes').where({ project_id: projectId, fingerprint }).first('id');
  return row?.id as string | undefined;
}

/** Codes of a project that came from one design, oldest first. */
export async function codesOfDesign(db: Database, projectId: string, design: Code['design']) {
  const rows = await db('codes')
    .where({ project_id: projectId })
    .whereRaw("json_extract(design, '$.family') = ?", design.family)
    .orderBy('id')
    .select('id', 'name', 'design', 'derivation', 'fingerprint');
  return rows
    .map(
      (row: Row): Pick<Code, 'id' | 'name' | 'design' | 'derivation' | 'fingerprint'> => ({
        id: row.id!,
        name: row.name!,
        design: JSON.parse(row.design!),
        derivation: JSON.parse(row.derivation!),
        fingerprint: row.fingerprint!,
      }),
    )
    .filter((row) => isDeepStrictEqual(row.design, design));
}

export async function matrixOf(db: Database, id: string): Promise<SparseMatrix | undefined> {
  const row = await db('codes').where({ id }).first('matrix');
  return row && unpackMatrix(row.matrix);
}

/** Of the ids given, the codes with parity checks that the project holds, each with its length. */
export async function codeLengths(db: Database, projectId: string, ids: readonly string[]) {
  const rows = await db('codes')
    .where({ project_id: projectId })
    .whereIn('id', ids)
    .whereRaw("json_extract(derivation, '$.kind') <> 'constant-weight'")
    .select('id', 'n');
  return new Map<string, number>(rows.map((row) => [row.id, row.n]));
}

/** Puts other properties in place of a code's; the rest of its analysis stays. */
export async function updateProperties(db: Database, id: string, properties: Code['properties']): Promise<void> {
  const json = JSON.stringify(properties);
  await db('codes')
    .where({ id })
    .update({ analysis: db.raw("json_set(analysis, '$.properties', json(?))", [json]) });
}

export async function runsUsingCode(db: Database, id: string): Promise<number> {
  const row = await db('points').where({ code_id: id }).countDistinct({ runs: 'run_id' }).first();
  return Number(row?.runs ?? 0);
}

/** Codes whose steps begin at this one's matrix. */
export async function codesFrom(db: Database, projectId: string, fingerprint: string): Promise<number> {
  const row = await db('codes')
    .where({ project_id: projectId })
    .whereRaw("json_extract(derivation, '$.base') = ?", fingerprint)
    .count({ count: '*' })
    .first();
  return Number(row?.count ?? 0);
}

export async function deleteCode(db: Database, id: string): Promise<void> {
  await db('codes').where({ id }).delete();
}

function toCode(row: Row): Code {
  return {
    id: row.id!,
    projectId: row.project_id!,
    name: row.name!,
    design: JSON.parse(row.design!),
    designTitle: row.design_title!,
    derivation: JSON.parse(row.derivation!),
    n: row.n!,
    k: row.k!,
    rows: row.row_count!,
    ones: row.one_count!,
    fingerprint: row.fingerprint!,
    ...(JSON.parse(row.analysis!) as Analysis),
    createdAt: row.created_at!,
    createdBy: row.author!,
  };
}
