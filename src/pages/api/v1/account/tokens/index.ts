import { endpoints } from '@/api/endpoints.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { createToken } from '@/server/use-cases/tokens/create-token.ts';
import { listTokens } from '@/server/use-cases/tokens/list-tokens.ts';

export const GET = handle(endpoints.listTokens, async (call) => ({ tokens: await listTokens(call) }));

export const POST = handle(endpoints.createToken, (call) => createToken(call, call.body));

export const ALL = methodNotAllowed('GET', 'POST');
