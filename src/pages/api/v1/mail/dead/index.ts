import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { listDeadLetters } from '@/server/use-cases/notices/dead-letters.ts';

export const GET = handle(endpoints.listDeadLetters, (call) => listDeadLetters(call, call.query));

export const ALL = methodNotAllowed('GET');
