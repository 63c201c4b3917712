import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { uploadPool } from '@/server/jobs/upload-pool.ts';
import { uploadCode } from '@/server/use-cases/codes/upload-code.ts';

export const POST = handle(endpoints.uploadCode, (call) => uploadCode(call, uploadPool(), call.params.id, call.query));

export const ALL = methodNotAllowed('POST');
