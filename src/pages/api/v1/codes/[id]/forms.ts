import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { codeForms } from '@/server/use-cases/codes/code-forms.ts';

export const GET = handle(endpoints.getForms, (call) => codeForms(call, call.params.id));

export const ALL = methodNotAllowed('GET');
