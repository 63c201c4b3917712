import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { deleteMeasurement } from '@/server/use-cases/measurements/delete-measurement.ts';

export const DELETE = handle(endpoints.deleteMeasurement, async (call) => {
  await deleteMeasurement(call, call.params.id);
  return undefined;
});

export const ALL = methodNotAllowed('DELETE');
