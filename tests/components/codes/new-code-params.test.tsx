import { describe, expect, test } from 'vitest';
import { choiceFromSearch, choiceToSearch } from '@/components/codes/new/address.ts';
import { paramsFrom, startingParams } from '@/components/codes/new/params.ts';
import { codeRows, designRows } from '@/components/codes/new/prediction-rows.ts';
import { refusalFrom, refusalOf } from '@/components/codes/refusal.ts';
import { listFamilies, predictDesign } from '@/core/index.ts';

const families = listFamilies();

function refusalFor(family: string, typed: Record<string, string>) {
  const { params } = families.find(({ id }) => id === family)!;
  try {
    predictDesign({ family, params: paramsFrom(params, startingParams(params, typed)) });
    return null;
  } catch (error) {
    return refusalOf(error);
  }
}

describe('the form of a construction', () => {
  test.each(families.map((family) => [family.id, family] as const))(
    '%s begins with parameters it accepts',
    (id, family) => {
      const params = paramsFrom(family.params, startingParams(family.params));
      const prediction = predictDesign({ family: id, params });
      expect(designRows(family.title, prediction)[0]?.value).toBe(family.title);
      for (const checks of ['blocks', 'points'] as const) {
        const [length] = codeRows(prediction, checks);
        expect(length?.label).toBe('Length n');
        expect(length?.grade).toBe('proved');
      }
    },
  );

  test('a projective plane of order 16 is predicted as (273, 191) with distance 18', () => {
    const rows = codeRows(predictDesign({ family: 'projective-plane', params: { q: 16 } }), 'blocks');
    const shown = Object.fromEntries(rows.map((row) => [row.label, `${row.value} ${row.grade}`]));
    expect(shown).toMatchObject({
      'Length n': '273 proved',
      'Dimension k': '191 proved',
      Rate: '0.6996 proved',
      Girth: '6 proved',
      Distance: '18 proved',
    });
  });

  test('a plane of order 6 is refused by the theorem that forbids it, with its source', () => {
    expect(refusalFor('projective-plane', { q: '6' })).toMatchObject({
      kind: 'infeasible',
      rule: expect.stringMatching(/bruck/),
      source: { authors: expect.stringContaining('Ryser') },
    });
  });

  test('eight points carry no triple system: refused by divisibility', () => {
    expect(refusalFor('steiner-triple', { v: '8' })).toMatchObject({ kind: 'infeasible', rule: 'divisibility' });
  });

  test.each(['', 'sixteen', '16.5', '-4'])('an order typed as %j names the parameter and what is accepted', (q) => {
    const refusal = refusalFor('projective-plane', { q });
    expect(refusal?.kind).toBe('param');
    expect(refusal).toMatchObject({ param: 'q', accepted: expect.stringContaining('prime power') });
  });
});

test('an order past what is built here is told as a limit', () => {
  expect(refusalFor('projective-plane', { q: '1e9' })).toMatchObject({ kind: 'limit' });
});

describe('what is to be built, in the address', () => {
  test('comes back as it was', () => {
    const choice = { family: 'steiner-triple', params: { v: '13', method: 'skolem' }, checks: 'points' as const };
    expect(choiceFromSearch(choiceToSearch(choice))).toEqual(choice);
  });

  test('leaves open what it does not say', () => {
    expect(choiceFromSearch('?checks=sideways&q=4')).toEqual({ params: { q: '4' } });
  });
});

describe('a refusal that crossed a worker’s border', () => {
  test('keeps rule, statement and source', () => {
    const source = { authors: 'R. H. Bruck, H. J. Ryser', year: 1949, title: 'The nonexistence' };
    const data = { rule: 'bruck-ryser', statement: 'none', source, param: 'q' };
    expect(refusalFrom('infeasible', 'none', data)).toEqual({ kind: 'infeasible', ...data });
  });

  test('without a shape of its own is told by its message', () => {
    expect(refusalFrom('internal', 'worker gone', {})).toEqual({ kind: 'other', message: 'worker gone' });
  });
});
