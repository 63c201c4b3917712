import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { NewCode } from '@/api/codes.ts';
import { readWordList } from '@/core/formats/word-list.ts';
import { createBuildPool } from '@/server/jobs/build-pool.ts';
import { createFilesPool } from '@/server/jobs/files-pool.ts';
import { matrixOf } from '@/server/repositories/codes.ts';
import { codeForms } from '@/server/use-cases/codes/code-forms.ts';
import { createCode } from '@/server/use-cases/codes/create-code.ts';
import { exportGenerator, exportWords } from '@/server/use-cases/codes/export-code.ts';
import { findLineage } from '@/server/use-cases/codes/find-lineage.ts';
import { getCode } from '@/server/use-cases/codes/get-code.ts';
import { getJob } from '@/server/use-cases/jobs/get-job.ts';
import { createRun } from '@/server/use-cases/runs/create-run.ts';
import { furnishedScratch } from './scratch-database.ts';

const pool = createBuildPool();
const files = createFilesPool();
let at: Awaited<ReturnType<typeof furnishedScratch>>;
beforeAll(async () => {
  at = await furnishedScratch();
});
afterAll(async () => {
  await Promise.all([pool.close(), files.close()]);
  await at.db.destroy();
});

const design = { family: 'projective-plane', params: { q: 4 } };

async function keep(derivation: NewCode['derivation']) {
  const made = await createCode(at.context, pool, at.projectId, { design, derivation });
  if ('code' in made) return made.code;
  const job = await vi.waitUntil(
    async () => {
      const state = await getJob(at.context, made.job.id);
      return state.state === 'done' ? state : null;
    },
    { timeout: 20_000, interval: 50 },
  );
  return getCode(at.context, job!.codeId!);
}

describe('the lineage of a code', () => {
  it('names the kept code of each earlier step, and none where a step was not kept', async () => {
    const plain = await keep({ kind: 'ldpc', checks: 'blocks' });
    const steps = [{ kind: 'shorten', bits: 2 }, { kind: 'extend-by-parity' }];
    const both = await keep({ kind: 'ldpc', checks: 'blocks', transforms: steps });
    expect(await findLineage(at.context, both)).toEqual([{ id: plain.id, name: plain.name }, null]);
    const first = await keep({ kind: 'ldpc', checks: 'blocks', transforms: steps.slice(0, 1) });
    expect((await findLineage(at.context, both))[1]).toEqual({ id: first.id, name: first.name });
    expect(await findLineage(at.context, plain)).toEqual([]);
  });

  it('is not told to those outside the project', async () => {
    const code = await keep({ kind: 'ldpc', checks: 'points', transforms: [{ kind: 'shorten', bits: 1 }] });
    const outsider = { ...at.context, caller: { ...at.context.caller, id: '0'.repeat(26) } };
    await expect(findLineage(outsider, code)).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('a constant-weight code', () => {
  it('is kept with its words as rows, n, w, M and the distance computed', async () => {
    const code = await keep({ kind: 'constant-weight' });
    expect(code).toMatchObject({ n: 21, k: 4, rows: 21, derivation: { kind: 'constant-weight' } });
    const values = Object.fromEntries(code.properties.map(({ key, number, grade }) => [key, { number, grade }]));
    expect(values).toMatchObject({
      w: { number: 5 },
      words: { number: 21 },
      distance: { number: 8 },
      optimality: { grade: 'proved' },
    });
    const words = await matrixOf(at.db, code.id);
    expect(words).toMatchObject({ rows: 21, cols: 21 });
  });

  it('of complements has weight n − k', async () => {
    const code = await keep({ kind: 'constant-weight', complement: true });
    expect(code.properties.find(({ key }) => key === 'w')?.number).toBe(16);
    expect(code.properties.find(({ key }) => key === 'distance')?.number).toBe(8);
  });

  it('is listed by number, and has neither generator nor test vectors', async () => {
    const [row] = await at.db('codes').whereRaw("json_extract(derivation, '$.kind') = 'constant-weight'").orderBy('id');
    const asked = { context: at.context, pool: files, codeId: row.id as string, signal: new AbortController().signal };
    const { stream, fileName } = await exportWords(asked, 'text');
    expect(fileName).toMatch(/\.words\.txt$/);
    const list = readWordList(new Uint8Array(await new Response(stream).arrayBuffer()));
    expect(list).toMatchObject({ n: 21, w: 5, M: 21 });
    const forms = await codeForms(at.context, row.id);
    expect(forms).toMatchObject({ generators: [], words: [{ id: 'text' }, { id: 'csv' }] });
    await expect(exportGenerator(asked, 'systematic')).rejects.toThrow(/no generator/);
  });

  it('has words; a parity-check code is refused where words are asked for', async () => {
    const [row] = await at.db('codes').whereRaw("json_extract(derivation, '$.kind') = 'ldpc'").orderBy('id');
    const asked = { context: at.context, pool: files, codeId: row.id as string, signal: new AbortController().signal };
    await expect(exportWords(asked, 'csv')).rejects.toThrow(/constant-weight/);
  });

  it('is refused in a run, which measures parity-check codes', async () => {
    const code = await keep({ kind: 'ldpc', checks: 'blocks', transforms: [{ kind: 'shorten', bits: 3 }] });
    const words = (await at.db('codes').whereRaw("json_extract(derivation, '$.kind') = 'constant-weight'").first()).id;
    const run = (codeId: string) =>
      createRun(at.context, at.projectId, {
        name: 'r',
        seed: 's',
        framesPerShard: 1000,
        place: 'server',
        stopping: { frameErrors: 10, maxFrames: 1000 },
        points: [{ codeId, channel: { kind: 'bsc', p: 0.01 }, decoder: { kind: 'majority-logic' } }],
      } as Parameters<typeof createRun>[2]);
    await expect(run(words)).rejects.toMatchObject({ message: expect.stringMatching(/parity checks/) });
    await expect(run(code.id)).resolves.toBeTruthy();
  });
});
