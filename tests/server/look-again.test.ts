import { expect, test } from 'vitest';
import { LookAgain } from '@/server/jobs/look-again.ts';

const turn = () => new Promise((resolve) => setTimeout(resolve));

test('what is asked for while it looks is looked for once more, never at the same time', async () => {
  let [at, most, looks] = [0, 0, 0];
  const looker = new LookAgain(
    async () => {
      most = Math.max(most, ++at);
      looks++;
      await turn();
      at--;
    },
    () => {},
  );
  for (let i = 0; i < 5; i++) looker.look();
  await turn();
  await turn();
  await turn();
  expect([looks, most]).toEqual([2, 1]);
  looker.look();
  await looker.close();
  expect(looks).toBe(3);
  looker.look();
  await turn();
  expect(looks).toBe(3);
});

test('an error is told and does not end it; once closed it is told no more', async () => {
  const told: unknown[] = [];
  const looker = new LookAgain(
    async () => {
      await turn();
      throw new Error('no database');
    },
    (error) => told.push(error),
  );
  looker.look();
  await turn();
  await turn();
  expect(told).toHaveLength(1);
  looker.look();
  await looker.close();
  expect(told).toHaveLength(1);
});
