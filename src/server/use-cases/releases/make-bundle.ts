import type { NewRelease } from '@/api/releases.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { generatorForms } from '@/core/formats/generator-forms.ts';
import { matrixFormats } from '@/core/formats/index.ts';
import type { Bundle } from '@/core/release/bundle.ts';
import { blockForms, type ReleaseContents } from '@/core/release/release-files.ts';
import { vectorForms } from '@/core/test-vectors/vector-files.ts';
import type { Database } from '../../db/database.ts';
import type { FilesPool } from '../../jobs/files-pool.ts';
import { refusalOfFailure } from '../../jobs/worker-refusal.ts';
import { matrixOf } from '../../repositories/codes.ts';
import type { CodeFacts } from '../../repositories/releases.ts';
import { snapshotByDigest } from '../../repositories/sign-offs.ts';

interface Made {
  codeId: string;
  contents: NewRelease['contents'];
  facts: CodeFacts;
  /** The folder inside the archive, and the archive's name without its ending. */
  folder: string;
}

/** Makes the bundle in a worker, from the stored matrix and the facts alone, so that what is learnt of the code later
 *  changes no released byte. @throws Refusal as the engine says, by the names of the request. */
export async function makeBundle(
  db: Database,
  pool: FilesPool,
  { codeId, contents, facts, folder }: Made,
  signal: AbortSignal,
): Promise<Bundle> {
  const { code, lineage, fingerprint, properties, program, signOff } = facts;
  const snapshot = signOff && (await snapshotByDigest(db, signOff.digest));
  const { design, designTitle, derivation, certificate } = lineage;
  const { name, n, k } = code;
  const released = {
    H: (await matrixOf(db, codeId))!,
    fingerprint,
    title: `(${n},${k}) ${designTitle}`,
    ...(design.family !== 'uploaded' && { design: design as DesignSpec }),
    ...(snapshot && { signOff: snapshot }),
    provenance: {
      program,
      code: { name, n, k },
      designTitle,
      design,
      derivation,
      fingerprint,
      certificate,
      properties,
    },
  };
  const request = { kind: 'bundle', code: released, contents: inOrder(contents), facts, folder } as const;
  const answer = await pool.run(request, { signal });
  if (!answer.ok) throw refusalOfFailure(answer.failure, fieldOf);
  return answer.bundle!;
}

/** Each form once and in the order of the tables, so that the order of asking changes nothing. */
function inOrder({ formats, generators, blocks, vectors }: NewRelease['contents']): ReleaseContents {
  const kept = <T extends string>(all: readonly { id: string }[], chosen: readonly T[]) =>
    all.map(({ id }) => id as T).filter((id) => chosen.includes(id));
  return {
    formats: kept(matrixFormats, formats),
    generators: kept(generatorForms, generators),
    blocks: kept(blockForms, blocks),
    ...(vectors && { vectors: { ...vectors, forms: kept(vectorForms, vectors.forms) } }),
  };
}

function fieldOf(param: string): string {
  if (['formats', 'generators', 'blocks'].includes(param)) return `contents.${param}`;
  return `contents.vectors.${param.replace(/^decoder\b/, 'decoders')}`;
}
