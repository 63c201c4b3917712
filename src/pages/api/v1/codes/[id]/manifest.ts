import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { getManifest } from '@/server/use-cases/codes/get-manifest.ts';

export const GET = handle(endpoints.getManifest, (call) => getManifest(call, call.params.id));

export const ALL = methodNotAllowed('GET');
