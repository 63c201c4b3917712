import { describe, expect, test } from 'vitest';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { questionCards } from '@/core/codes/questions/cards.ts';
import { type CodeQuestionId, codeQuestionIds, codeQuestions } from '@/core/codes/questions/index.ts';
import type { CodeOutline } from '@/core/codes/questions/question.ts';
import { buildDesign } from '@/core/designs/design.ts';

const fano = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 2 } }), { checks: 'blocks' });
const ask = (id: CodeQuestionId, seconds = 1) => codeQuestions[id].answer(fano, { seconds });
const line = (id: CodeQuestionId, key: string) => ask(id).lines.find((one) => one.key === key);

describe('questions to the (7, 3) code of the Fano plane', () => {
  test('every answer is graded and says its method', () => {
    for (const id of codeQuestionIds) {
      const { lines } = ask(id);
      expect(lines.length, id).toBeGreaterThan(0);
      for (const { grade, method } of lines) expect([grade.length > 0, method.length > 0]).toEqual([true, true]);
    }
  });

  // The simplex code: seven words of weight 4 beside zero (MacWilliams and Sloane 1977, ch. 1, §9).
  test('its distance is 4 and it has seven words of that weight', () => {
    expect(line('distance', 'distance')?.text).toBe('4');
    expect(line('weights', 'lightest')).toMatchObject({ label: 'Words of weight 4', text: '7' });
    expect(ask('weights').list?.text).toBe('weight,codewords\n0,1\n4,7\n');
  });

  // Three lines in general position make a hexagon in the Heawood graph: 28 of them.
  test('28 hexagons, twelve through each point', () => {
    expect(line('cycles', 'cycles-6')?.text).toBe('28');
    expect(ask('cycles').histogram?.bars).toEqual([[12, 7]]);
  });

  // The smallest stopping sets of a plane of even order are its hyperovals (Kashyap and Vardy 2003): 7 of 4 points here.
  test('its smallest stopping sets have four bits, and are listed', () => {
    expect(line('stoppingSets', 'stopping-size')).toMatchObject({ text: '4' });
    expect(ask('stoppingSets').list?.text.split('\n')[0]).toBe('size,bits');
  });
});

describe('the encoders of the (7, 3) code', () => {
  test('are each a line with its grade, a row of the table and a line of the list', () => {
    const { lines, table, list } = ask('encoders');
    const forms = lines.filter(({ key }) => /-\d$/.test(key));
    expect(forms.map(({ label }) => label)).toEqual(table!.rows.map(([title, form]) => `${title}: ${form}`));
    expect(list?.text.split('\n')).toHaveLength(table!.rows.length + 2);
    // g = (x + 1)(x³ + x + 1) has four terms, its register four stages (Peterson and Weldon 1972, ch. 8).
    expect(lines[0]).toMatchObject({
      key: 'encoder-shift-register-1',
      text: '3 XOR gates, 4 flip-flops, 7 clocks a word',
      grade: 'computed',
      method: expect.stringMatching(/generator polynomial: x\^4 \+ .*random words encoded and checked/),
    });
    expect(lines.find(({ key }) => key === 'encoder-circulants')).toMatchObject({ text: 'none', grade: 'proved' });
  });

  test('are told in steps', () => {
    const shares: number[] = [];
    codeQuestions.encoders.answer(fano, { seconds: 1, onProgress: (share) => shares.push(share) });
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(shares.length).toBeGreaterThan(2);
  });
});

describe('a question that does not fit', () => {
  const outline: CodeOutline = { n: 273, k: 191, ones: 4641, columnWeights: [[17, 273]] };

  test('says for which codes it is asked', () => {
    expect(questionCards.weights.obstacle(outline)).toContain('82');
    expect(questionCards.absorbingSets.obstacle(outline)).toContain('weights 3 to 5');
    expect(questionCards.distance.obstacle({ ...outline, k: 0 })).toContain('besides zero');
    expect(questionCards.cycles.obstacle(outline)).toBeNull();
  });
});
