import { endpoints } from '@/api/endpoints.ts';
import { sessionIdOf } from '@/server/auth/identity.ts';
import { clientAddressOf } from '@/server/http/client-address.ts';
import { handle, methodNotAllowed } from '@/server/http/handle.ts';
import { changePassword } from '@/server/use-cases/account/change-password.ts';

export const PUT = handle(endpoints.putPassword, (call) =>
  changePassword(call, call.body, { sessionId: sessionIdOf(call.by), address: clientAddressOf(call.request) }),
);

export const ALL = methodNotAllowed('PUT');
