import type { Measurement } from '@/api/measurements.ts';
import type { Context } from '../../context.ts';
import { measurementsOf } from '../../repositories/measurements.ts';
import { projectToRead } from '../rights.ts';
import { shownMeasurement } from './shown-measurement.ts';

/** The project's measured data, newest first. */
export async function listMeasurements(context: Context, projectId: string): Promise<Measurement[]> {
  await projectToRead(context, projectId);
  return (await measurementsOf(context.db, projectId)).map(shownMeasurement);
}
