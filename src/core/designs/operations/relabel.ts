import { z } from 'zod';
import { seededRandom } from '../../algebra/seeded-random.ts';
import { blockOf, designFromBlocks } from '../block-design.ts';
import { buildDesign, predictDesign } from '../design.ts';
import { defineFamily } from '../family.ts';
import { innerSpecParam, innerSpecSchema, specsOf } from './inner-spec.ts';

/** The same design under a permutation of its points fixed by a seed; blocks keep their order and classes. */
export const relabel = defineFamily({
  id: 'relabel',
  title: 'Relabelled design',
  params: [
    innerSpecParam('of', { family: 'projective-plane', params: { q: 4 } }),
    { name: 'seed', label: 'seed', kind: 'text', accepted: 'a text of 1 to 64 characters', example: '1' },
  ],
  source: {
    authors: 'R. Durstenfeld',
    year: 1964,
    title: 'Algorithm 235: Random permutation',
    where: 'Commun. ACM 7, 420',
  },
  schema: z.strictObject({ of: innerSpecSchema, seed: z.string().min(1).max(64) }),
  *enumerate(window) {
    for (const of of specsOf('kirkman-triple', window)) yield { of, seed: '1' };
  },
  predict({ of }) {
    const { cyclic: _, codes, ...inner } = predictDesign(of);
    return { ...inner, codes: codes.map((code) => ({ ...code, structure: 'none' as const })) };
  },
  build({ of, seed }) {
    const design = buildDesign(of);
    const name = seededRandom(seed).shuffle(Uint32Array.from({ length: design.v }, (_, p) => p));
    const symmetry = design.symmetry?.map(({ order, pointPerm }) => {
      const renamed = new Uint32Array(design.v);
      pointPerm.forEach((image, p) => {
        renamed[name[p]!] = name[image]!;
      });
      return { order, pointPerm: renamed };
    });
    const blocks = Array.from({ length: design.b }, (_, i) => blockOf(design, i).map((p) => name[p]!));
    return designFromBlocks(design.v, blocks, { classes: design.classes, symmetry });
  },
});
