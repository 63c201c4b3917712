import { createAnalyseApi } from '@workers/analyse/analyse.ts';
import { expect, test } from 'vitest';

const fano = { kind: 'spec', spec: { family: 'projective-plane', params: { q: 2 } } } as const;
const ignore = () => {};

test('a worker opens a design, step by step, and answers what is asked of it', async () => {
  const api = createAnalyseApi();
  const steps: string[] = [];
  const opening = await api.open('a', fano, (step) => steps.push(step));
  expect(steps).toEqual(['build', 'verify']);
  expect(opening).toMatchObject({ ok: true, opened: { design: { v: 7, b: 7 }, certificate: { holds: true } } });
  expect(await api.ask('a', 'automorphisms', {}, ignore)).toMatchObject({
    ok: true,
    answer: { order: { value: 168n } },
  });
});

test('a fresh worker is given the blocks that another opened, and answers the same', async () => {
  const opening = await createAnalyseApi().open('a', fano, ignore);
  if (!opening.ok) throw new Error(opening.failure.message);
  const fresh = createAnalyseApi();
  expect(await fresh.ask('a', 'pasches', {}, ignore)).toMatchObject({ ok: false, failure: { code: 'unknown-design' } });
  fresh.load('a', structuredClone(opening.opened));
  expect(await fresh.ask('a', 'pasches', {}, ignore)).toMatchObject({ ok: true, answer: { value: 7 } });
});

test('refusals come back as data, with what they would accept', async () => {
  const api = createAnalyseApi();
  const order6 = { kind: 'spec', spec: { family: 'projective-plane', params: { q: 6 } } } as const;
  expect(await api.open('b', order6, ignore)).toMatchObject({ ok: false, failure: { code: 'infeasible' } });
  await api.open('c', { kind: 'spec', spec: { family: 'projective-plane', params: { q: 9 } } }, ignore);
  expect(await api.ask('c', 'automorphisms', {}, ignore)).toMatchObject({
    ok: false,
    failure: { code: 'limit', data: { limit: 64, unit: 'points' } },
  });
});
