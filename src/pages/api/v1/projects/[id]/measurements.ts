import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { createMeasurement } from '@/server/use-cases/measurements/create-measurement.ts';
import { listMeasurements } from '@/server/use-cases/measurements/list-measurements.ts';

export const GET = handle(endpoints.listMeasurements, async (call) => ({
  measurements: await listMeasurements(call, call.params.id),
}));

export const POST = handle(endpoints.createMeasurement, async (call) => ({
  measurement: await createMeasurement(call, call.params.id, call.body),
}));

export const ALL = methodNotAllowed('GET', 'POST');
