import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { type Code, type NewCode, newCodeSchema } from '@/api/codes.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { buildDesign } from '@/core/designs/design.ts';
import { exportMatrix } from '@/core/formats/index.ts';
import { nowText } from '@/server/context.ts';
import { newId } from '@/server/ids.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createUploadPool } from '@/server/jobs/upload-pool.ts';
import { matrixOf } from '@/server/repositories/codes.ts';
import { insertJob } from '@/server/repositories/jobs.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { deleteCode } from '@/server/use-cases/codes/delete-code.ts';
import { findLineage } from '@/server/use-cases/codes/find-lineage.ts';
import { getCode } from '@/server/use-cases/codes/get-code.ts';
import { uploadCode } from '@/server/use-cases/codes/upload-code.ts';
import { getJob } from '@/server/use-cases/jobs/get-job.ts';
import { redoInterruptedJobs } from '@/server/use-cases/jobs/redo-interrupted-jobs.ts';
import { createProject } from '@/server/use-cases/projects/create-project.ts';
import { furnishedScratch } from './scratch-database.ts';

const pool = createBuildPool();
const uploads = createUploadPool();
let at: Awaited<ReturnType<typeof furnishedScratch>>;
beforeAll(async () => {
  at = await furnishedScratch();
  vi.stubEnv('DATA_DIR', at.dataDir);
}, 60_000);
afterAll(async () => {
  await Promise.all([pool.close(), uploads.close()]);
  await at.db.destroy();
});

const plane = buildDesign({ family: 'projective-plane', params: { q: 4 } });
const H = deriveLdpc(plane, { checks: 'blocks' }).H;

async function upload(matrix = H, projectId = at.projectId): Promise<Code> {
  const body = exportMatrix(matrix, 'alist') as Uint8Array<ArrayBuffer>;
  const headers = { 'content-type': 'application/octet-stream' };
  const request = new Request('http://here/', { method: 'POST', body, headers });
  const query = { fileName: 'h.alist', checksAre: 'rows' as const };
  return (await uploadCode({ ...at.context, request }, uploads, projectId, query)).code;
}

async function jobDone(id: string): Promise<Code> {
  const job = await vi.waitUntil(
    async () => {
      const state = await getJob(at.context, id);
      return state.state === 'done' || state.state === 'failed' ? state : null;
    },
    { timeout: 20_000, interval: 50 },
  );
  return getCode(at.context, job!.codeId!);
}

async function keep(request: NewCode, projectId = at.projectId): Promise<Code> {
  const made = await createCode(at.context, pool, projectId, newCodeSchema.parse(request));
  return 'code' in made ? made.code : jobDone(made.job.id);
}

const stored = (base: string, ...transforms: { kind: string; [param: string]: unknown }[]): NewCode => ({
  derivation: { kind: 'stored', base, transforms },
});

describe('steps from an uploaded matrix', () => {
  let base: Code;
  beforeAll(async () => {
    base = await upload();
  }, 60_000);

  it('make a code of their own, whose lineage begins at the upload', async () => {
    const shortened = await keep(stored(base.fingerprint, { kind: 'shorten', bits: 2 }));
    expect(shortened).toMatchObject({ n: base.n - 2, k: base.k - 2, design: base.design, certificate: null });
    expect(shortened.derivation).toEqual(stored(base.fingerprint, { kind: 'shorten', bits: 2 }).derivation);
    const twice = await keep(stored(base.fingerprint, { kind: 'shorten', bits: 2 }, { kind: 'extend-by-parity' }));
    expect(twice.n).toBe(shortened.n + 1);
    expect(await findLineage(at.context, twice)).toEqual([
      { id: base.id, name: base.name },
      { id: shortened.id, name: shortened.name },
    ]);
    expect(await findLineage(at.context, base)).toEqual([]);
  });

  it('give the matrix that the same steps make of its construction', async () => {
    const step = { kind: 'lift', size: 8, girth: 6, seed: 'x' };
    const code = await keep(stored(base.fingerprint, step));
    const built = deriveLdpc(plane, { checks: 'blocks', transforms: [step] });
    expect(await matrixOf(at.db, code.id)).toEqual(built.H);
  });

  it('keep the upload in the project as long as a code begins from it', async () => {
    const projectId = (await createProject(at.context, { name: 'Kept' })).id;
    const first = await upload(H, projectId);
    const code = await keep(stored(first.fingerprint, { kind: 'transpose' }, { kind: 'shorten', bits: 1 }), projectId);
    await expect(deleteCode(at.context, first.id)).rejects.toMatchObject({ code: 'in-use' });
    await deleteCode(at.context, code.id);
    await deleteCode(at.context, first.id);
    await expect(getCode(at.context, first.id)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('are taken up again after a restart', async () => {
    const request = stored(base.fingerprint, { kind: 'split-columns', parts: 5 });
    const id = newId();
    await insertJob(at.db, {
      id,
      projectId: at.projectId,
      request,
      createdBy: at.context.caller.id,
      createdAt: nowText(),
    });
    await redoInterruptedJobs(at.db, pool);
    expect(await jobDone(id)).toMatchObject({ n: 5 * base.n, derivation: request.derivation });
  });
});

describe('refused', () => {
  it('is a base that the project does not hold, also one of another project', async () => {
    const elsewhere = (await createProject(at.context, { name: 'Elsewhere' })).id;
    const matrix = deriveLdpc(plane, { checks: 'points', transforms: [{ kind: 'shorten', bits: 1 }] }).H;
    const code = await upload(matrix, elsewhere);
    for (const base of ['0'.repeat(64), code.fingerprint])
      await expect(keep(stored(base, { kind: 'transpose' }))).rejects.toMatchObject({
        code: 'param',
        message: expect.stringContaining('the project holds no such matrix'),
      });
  });

  it('is a base that was built here, which its own derivation names', async () => {
    const design = { family: 'projective-plane', params: { q: 2 } };
    const built = await keep({ design, derivation: { kind: 'ldpc', checks: 'blocks' } });
    await expect(keep(stored(built.fingerprint, { kind: 'transpose' }))).rejects.toMatchObject({
      message: expect.stringContaining('its design and derivation are given'),
    });
  });

  it('are a step that leaves no code and one that needs a construction, by the step’s name', async () => {
    const base = await upload(buildMatrix());
    const refused = (step: { kind: string; [param: string]: unknown }) =>
      expect(keep(stored(base.fingerprint, step))).rejects.toMatchObject({ code: 'param' });
    await refused({ kind: 'shorten', bits: 1000 });
    await refused({ kind: 'keep-classes', classes: 1 });
    await refused({ kind: 'bend' });
  });

  it('are a design beside a base, and neither of both', () => {
    const issue = (request: unknown) => newCodeSchema.safeParse(request).error?.issues[0];
    const design = { family: 'projective-plane', params: { q: 2 } };
    expect(issue({ ...stored('0'.repeat(64), { kind: 'transpose' }), design })).toMatchObject({ path: ['design'] });
    expect(issue({ derivation: { kind: 'ldpc', checks: 'blocks' } })).toMatchObject({ path: ['design'] });
    expect(issue(stored('0'.repeat(64)))).toMatchObject({ path: ['derivation', 'transforms'] });
  });
});

const buildMatrix = () => deriveLdpc(buildDesign({ family: 'affine-plane', params: { q: 4 } }), { checks: 'blocks' }).H;
