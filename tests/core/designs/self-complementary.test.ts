import { describe, expect, it } from 'vitest';
import { blockOf, designFromBlocks } from '../../../src/core/designs/block-design.ts';
import { buildDesign } from '../../../src/core/designs/design.ts';
import { isSelfComplementary } from '../../../src/core/designs/self-complementary.ts';
import { blocksContaining, verifyDesign } from '../../../src/core/designs/verify.ts';

const hadamard = (order: number) => buildDesign({ family: 'hadamard', params: { order, t: 3 } });

describe('blocks closed under complement', () => {
  it('are told from those that are not, each as often as it occurs', () => {
    const pairs = [
      [0, 1],
      [2, 3],
      [0, 2],
      [1, 3],
    ];
    expect(isSelfComplementary(designFromBlocks(4, pairs))).toBe(true);
    expect(isSelfComplementary(designFromBlocks(4, pairs.slice(1)))).toBe(false);
    expect(isSelfComplementary(designFromBlocks(4, [...pairs, [0, 1]]))).toBe(false);
    expect(isSelfComplementary(designFromBlocks(5, pairs))).toBe(false);
  });

  it('prove a 3-design of 1,024 points by its pairs; a sample of triples agrees', () => {
    const design = hadamard(1024);
    const certificate = verifyDesign(design, { t: 3, lambda: 255 });
    expect(certificate).toMatchObject({ holds: true, subsetsCounted: (1024 * 1023) / 2 });
    expect(certificate.method).toMatch(/complement .*Alltop 1975/);
    for (const triple of [
      [0, 1, 2],
      [5, 400, 1023],
      [100, 200, 301],
    ]) {
      expect(blocksContaining(design, triple)).toBe(255);
    }
  });

  it('with a pair covered too often are refused with that pair', () => {
    const { v, b, ...rest } = hadamard(512);
    const blocks = Array.from({ length: b }, (_, i) => [...blockOf({ v, b, ...rest }, i)]);
    // Two points change places in one block and in its complement.
    const inside = new Set(blocks[0]);
    const [out, into] = [blocks[0]![0]!, blocks.flat().find((point) => !inside.has(point))!];
    const swapped = new Map([
      [out, into],
      [into, out],
    ]);
    const isTouched = (block: number[]) =>
      block.every((point) => inside.has(point)) || block.every((point) => !inside.has(point));
    const bent = blocks.map((block) =>
      isTouched(block) ? block.map((point) => swapped.get(point) ?? point).sort((x, y) => x - y) : block,
    );
    const certificate = verifyDesign(designFromBlocks(v, bent), { t: 3, lambda: 127 });
    expect(certificate.holds).toBe(false);
    const { points, covered } = certificate.counterexample!;
    expect(points).toHaveLength(2);
    expect(bent.filter((block) => points.every((point) => block.includes(point)))).toHaveLength(covered);
    expect(covered).not.toBe(255);
  });
});
