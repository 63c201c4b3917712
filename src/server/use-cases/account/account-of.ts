import type { Account } from '@/api/account.ts';
import type { Caller } from '../../context.ts';

/** What a person is shown of the own account. */
export const accountOf = ({ email, name, role }: Caller): Account => ({ email, name, role });
