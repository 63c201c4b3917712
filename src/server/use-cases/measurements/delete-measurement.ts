import type { Context } from '../../context.ts';
import { inTransaction } from '../../db/database.ts';
import { isId } from '../../ids.ts';
import { notFound } from '../../refusal.ts';
import { recordEvent } from '../../repositories/audit-events.ts';
import { deleteMeasurement as deleteRow, measurementById } from '../../repositories/measurements.ts';
import { projectToWrite } from '../rights.ts';

export async function deleteMeasurement(context: Context, measurementId: string): Promise<void> {
  const measured = isId(measurementId) ? await measurementById(context.db, measurementId) : undefined;
  if (!measured) throw notFound('data set');
  const { projectId, name, fileName, points } = measured;
  await projectToWrite(context, projectId, 'data set');
  await inTransaction(context.db, async (trx) => {
    await deleteRow(trx, measurementId);
    const content = { name, fileName, points };
    await recordEvent(trx, context.caller, { projectId, kind: 'measurement.deleted', subject: measurementId, content });
  });
}
