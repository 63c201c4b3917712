import { expect, it } from 'vitest';
import { blockOf } from '../../src/core/designs/block-design.ts';
import { isDifferenceFamily } from '../../src/core/designs/difference-families/difference-table.ts';
import { steinerTriple } from '../../src/core/designs/families/steiner-triple.ts';
import { cyclicBaseTriples } from '../../src/core/designs/triple-systems/peltesohn.ts';
import { designFromUpload } from '../../src/core/designs/upload.ts';
import { verifyDesign } from '../../src/core/designs/verify.ts';

const admissible = (v: number) => v % 6 === 1 || v % 6 === 3;

it('Bose and Skolem reach every v ≡ 1, 3 (mod 6) up to 3,000', { timeout: 600_000 }, () => {
  for (let v = 7; v <= 3000; v++) {
    if (!admissible(v)) continue;
    const design = steinerTriple.build(steinerTriple.parse({ v, method: v % 6 === 3 ? 'bose' : 'skolem' }));
    expect(verifyDesign(design, { t: 2, lambda: 1 }).holds, `v = ${v}`).toBe(true);
  }
});

it('a cyclic system exists for every such v up to 3,000 but 9', { timeout: 600_000 }, () => {
  for (let v = 7; v <= 3000; v++)
    if (admissible(v) && v !== 9) expect(isDifferenceFamily(v, 1, cyclicBaseTriples(v)), `v = ${v}`).toBe(true);
});

it('climbing reaches 2,995 points', { timeout: 600_000 }, () => {
  const design = steinerTriple.build(steinerTriple.parse({ v: 2995, method: 'random', seed: 'end' }));
  expect(verifyDesign(design, { t: 2, lambda: 1 }).holds).toBe(true);
});

it('an uploaded list of nearly a million triples is found to be a 2-design', { timeout: 600_000 }, () => {
  const design = steinerTriple.build(steinerTriple.parse({ v: 2449, method: 'skolem' }));
  const blocks = Array.from({ length: design.b }, (_, i) => [...blockOf(design, i)]);
  expect(blocks.length).toBe(999_192);
  expect(designFromUpload(blocks)).toMatchObject({ t: 2, lambda: 1 });
});
