import type { BuildRequest } from '@workers/build/api.ts';
import type { Code, NewCode } from '@/api/codes.ts';
import type { Database } from '../../db/database.ts';
import { Refusal } from '../../refusal.ts';
import { codeById, codeIdByFingerprint, matrixOf } from '../../repositories/codes.ts';

type Asked = Pick<NewCode, 'design' | 'derivation'>;

/** The uploaded code of the project that a stored derivation begins from.
 *  @throws Refusal when the project holds none of this fingerprint. */
export async function storedBase(db: Database, projectId: string, base: string): Promise<Code> {
  const id = await codeIdByFingerprint(db, projectId, base);
  const code = id && (await codeById(db, id));
  if (code && code.design.family === 'uploaded' && code.derivation.kind !== 'stored') return code;
  const accepted = 'the fingerprint of a matrix or block list uploaded to this project';
  const reason = code
    ? 'this code was built here, so its design and derivation are given'
    : 'the project holds no such matrix';
  throw new Refusal('param', `derivation.base: ${reason}; accepted is ${accepted}.`, {
    fields: { 'derivation.base': accepted },
  });
}

/** The design that a code is kept under: its own, or that of the upload it begins from. */
export async function designOf(
  db: Database,
  projectId: string,
  { design, derivation }: Asked,
): Promise<Code['design']> {
  return derivation.kind === 'stored' ? (await storedBase(db, projectId, derivation.base)).design : design!;
}

/** What a worker is given to build. */
export async function buildRequestOf(db: Database, projectId: string, asked: Asked): Promise<BuildRequest> {
  const { design, derivation } = asked;
  if (derivation.kind !== 'stored') return { design, derivation } as BuildRequest;
  const { id, designTitle } = await storedBase(db, projectId, derivation.base);
  return { matrix: (await matrixOf(db, id))!, designTitle, transforms: derivation.transforms };
}
