import { fingerprint } from '@/core/codes/fingerprint.ts';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { buildDesign } from '@/core/designs/design.ts';
import type { ReleaseContents, ReleasedCode } from '@/core/release/release-files.ts';

const design = { family: 'projective-plane', params: { q: 4 } };
const { H } = deriveLdpc(buildDesign(design), { checks: 'blocks' });

/** The plane of order 4 with everything that a bundle can hold. */
export const exampleCode: ReleasedCode = {
  H,
  fingerprint: await fingerprint(H),
  title: '(21,11) projective plane, q = 4',
  design,
  provenance: { designTitle: 'projective plane, q = 4' },
};

export const everything: ReleaseContents = {
  formats: ['alist', 'mtx', 'csv', 'json', 'npz', 'npy', 'mat', 'c', 'qc'],
  generators: ['polynomial', 'circulants', 'systematic'],
  blocks: ['text', 'json'],
  vectors: {
    channel: { kind: 'bsc', p: 0.05 },
    decoders: [{ kind: 'gallager-b' }, { kind: 'bit-flipping' }],
    seed: 'release',
    count: 25,
    forms: ['jsonl', 'hex'],
  },
};

export const exampleFacts = {
  manifest: 'blockwright-release-1',
  title: 'Example, release 1',
  fingerprint: exampleCode.fingerprint,
  cautions: ['Measured error rates hold for the channel model and decoder stated, not for a device.'],
};
