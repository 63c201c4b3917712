import type { Measurement, NewMeasurement } from '@/api/measurements.ts';
import { type Context, nowText } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { newId } from '../../ids.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { insertMeasurement, measurementById } from '../../repositories/measurements.ts';
import { projectToWrite } from '../rights.ts';
import { shownMeasurement } from './shown-measurement.ts';

/** Keeps error rates that were measured elsewhere, to be laid over this project's own. */
export async function createMeasurement(
  context: Context,
  projectId: string,
  measured: NewMeasurement,
): Promise<Measurement> {
  await projectToWrite(context, projectId);
  const { db, caller } = context;
  const id = newId();
  await inTransaction(db, async (trx) => {
    await insertMeasurement(trx, { ...measured, id, projectId, createdBy: caller.id, createdAt: nowText() });
    const content = { name: measured.name, fileName: measured.fileName, points: measured.points.length };
    await recordEvent(trx, caller, { projectId, kind: 'measurement.created', subject: id, content });
  });
  return shownMeasurement((await measurementById(db, id))!);
}
