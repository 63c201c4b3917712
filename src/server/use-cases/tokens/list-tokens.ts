import type { Token } from '@/api/tokens.ts';
import type { Context } from '../../context.ts';
import { tokensOf } from '../../repositories/api-tokens.ts';

/** The caller's own tokens; nobody sees another's. */
export const listTokens = ({ db, caller }: Context): Promise<Token[]> => tokensOf(db, caller.id);
