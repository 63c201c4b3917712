import { performance } from 'node:perf_hooks';
import { deriveConstantWeight } from '../../src/core/codes/constant-weight/constant-weight-code.ts';
import { tableEncoder } from '../../src/core/codes/constant-weight/enumerative.ts';
import { approximateTriangularEncoder } from '../../src/core/codes/encode/approximate-triangular.ts';
import { systematicCirculants } from '../../src/core/codes/encode/systematic-circulants.ts';
import { denseEncoder, systematicEncoder, type WordEncoder } from '../../src/core/codes/encode/systematic-encoder.ts';
import { deriveLdpc } from '../../src/core/codes/ldpc.ts';
import type { SparseMatrix } from '../../src/core/codes/sparse-matrix.ts';
import { buildDesign } from '../../src/core/designs/design.ts';
import type { Row } from './row.ts';

/** Information bits a second, in millions, over about a fifth of a second. */
function megabits(encoder: WordEncoder): number {
  const info = Uint8Array.from({ length: encoder.k }, (_, i) => (Math.imul(i + 7, 2654435761) >>> 31) & 1);
  for (let i = 0; i < 20; i++) encoder.encode(info);
  const from = performance.now();
  let words = 0;
  while (performance.now() - from < 200) {
    for (let i = 0; i < 10; i++) encoder.encode(info);
    words += 10;
  }
  return (words * encoder.k) / (performance.now() - from) / 1000;
}

const plane = (q: number): SparseMatrix =>
  deriveLdpc(buildDesign({ family: 'projective-plane', params: { q } }), { checks: 'blocks' }).H;

export async function bench(): Promise<Row[]> {
  const rows: Row[] = [];
  const measured = (metric: string, encoder: WordEncoder) =>
    rows.push({ metric: `encode ${metric}`, value: megabits(encoder), unit: 'Mbit/s', better: 'higher' });
  for (const q of [16, 32]) {
    const H = plane(q);
    measured(`PG(2,${q}) by division`, systematicEncoder({ H }));
    measured(`PG(2,${q}) by dense rows`, denseEncoder(H));
    measured(`PG(2,${q}) by the triangle`, approximateTriangularEncoder(H));
  }
  const lifted = deriveLdpc(buildDesign({ family: 'transversal', params: { k: 3, g: 4 } }), {
    checks: 'points',
    transforms: [{ kind: 'lift', size: 61, girth: 6 }],
  }).H;
  measured('a lifted TD(3,4), z = 61, by the triangle', approximateTriangularEncoder(lifted));
  const circulants = systematicCirculants(lifted);
  if ('encode' in circulants) measured('the same by circulants', circulants);
  const from = performance.now();
  const code = deriveConstantWeight(buildDesign({ family: 'steiner-triple', params: { v: 775, method: 'cyclic' } }));
  rows.push({ metric: 'distance of 99,975 triples, design built first', value: performance.now() - from, unit: 'ms' });
  const { messageBits, encode } = tableEncoder(code);
  measured('99,975 triples by their numbers', {
    k: messageBits,
    infoPositions: new Uint32Array(0),
    encode,
  });
  return rows;
}
