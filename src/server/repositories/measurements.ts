import type { Measurement, NewMeasurement } from '@/api/measurements.ts';
import type { Database } from '../db/database.ts';
import type { Row } from './row.ts';

/** A data set as it lies in the database, without what is computed of it. */
export type StoredMeasurement = Omit<Measurement, 'points' | 'level'> & Pick<NewMeasurement, 'points'>;

export interface NewMeasurementRow extends NewMeasurement {
  id: string;
  projectId: string;
  createdBy: string;
  createdAt: string;
}

export async function insertMeasurement(db: Database, row: NewMeasurementRow): Promise<void> {
  await db('measurements').insert({
    id: row.id,
    project_id: row.projectId,
    name: row.name,
    file_name: row.fileName,
    n: row.n,
    k: row.k,
    points: JSON.stringify(row.points),
    created_by: row.createdBy,
    created_at: row.createdAt,
  });
}

const shown = (db: Database) =>
  db('measurements')
    .join('users', 'users.id', 'measurements.created_by')
    .select('measurements.*', 'users.name as author');

/** Data sets of a project, newest first; at most as many as one chart could ever show. */
export async function measurementsOf(db: Database, projectId: string): Promise<StoredMeasurement[]> {
  const rows = await shown(db)
    .where('measurements.project_id', projectId)
    .orderBy('measurements.id', 'desc')
    .limit(500);
  return rows.map(toMeasurement);
}

export async function measurementById(db: Database, id: string): Promise<StoredMeasurement | undefined> {
  const row = await shown(db).where('measurements.id', id).first();
  return row && toMeasurement(row);
}

export async function deleteMeasurement(db: Database, id: string): Promise<void> {
  await db('measurements').where({ id }).delete();
}

function toMeasurement(row: Row): StoredMeasurement {
  return {
    id: row.id!,
    projectId: row.project_id!,
    name: row.name!,
    fileName: row.file_name!,
    n: row.n!,
    k: row.k!,
    points: JSON.parse(row.points!),
    createdAt: row.created_at!,
    createdBy: row.author!,
  };
}
