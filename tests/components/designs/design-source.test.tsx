import { afterEach, expect, test, vi } from 'vitest';
import { sourceOf } from '@/components/designs/design-source.ts';
import { fingerprint } from '@/core/codes/fingerprint.ts';
import { matrixFromRows } from '@/core/codes/sparse-matrix.ts';
import { exportMatrix } from '@/core/formats/index.ts';

afterEach(() => vi.unstubAllGlobals());

const H = matrixFromRows(4, [
  [0, 1],
  [1, 2, 3],
]);
const uploaded = { family: 'uploaded', params: {} };

test('a kept code’s blocks are built from its spec, without asking the server', async () => {
  const fetched = vi.fn();
  vi.stubGlobal('fetch', fetched);
  const design = { family: 'projective-plane', params: { q: 4 } };
  const code = { id: 'a', fingerprint: '', design, derivation: { kind: 'ldpc', checks: 'points' } } as const;
  expect(await sourceOf(code)).toEqual({ kind: 'spec', spec: design });
  expect(fetched).not.toHaveBeenCalled();
});

test.each([
  ['b', { kind: 'ldpc', checks: 'blocks' }, 'rows'],
  ['c', { kind: 'ldpc', checks: 'points' }, 'columns'],
  ['d', { kind: 'matrix', checksAre: 'rows' }, 'rows'],
] as const)('an uploaded code’s blocks are read off its matrix (%s)', async (id, derivation, blocksAre) => {
  vi.stubGlobal('fetch', async () => new Response(exportMatrix(H, 'mtx') as BodyInit));
  const source = await sourceOf({ id, fingerprint: await fingerprint(H), design: uploaded, derivation });
  expect(source).toMatchObject({ kind: 'matrix', blocksAre, H: { rows: 2, cols: 4 } });
});
