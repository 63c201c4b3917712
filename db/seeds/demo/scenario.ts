import type { Code, NewCode } from '@/api/codes.ts';
import type { ProjectRole, Requirements } from '@/api/projects.ts';
import type { Stopping } from '@/api/runs.ts';
import type { Channel } from '@/core/channels/channel.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';

/** The invented scenario: a firm that builds tide-gauge buoys. Accounts are named by role, not by people. */
export const demoPassword = 'shore-archive';

export const demoAccounts: readonly {
  role: ProjectRole;
  name: string;
  workspaceRole: 'administrator' | 'member' | 'guest';
}[] = [
  { role: 'owner', name: 'Demo owner', workspaceRole: 'administrator' },
  { role: 'engineer', name: 'Demo engineer', workspaceRole: 'member' },
  { role: 'reviewer', name: 'Demo reviewer', workspaceRole: 'member' },
  { role: 'viewer', name: 'Demo viewer', workspaceRole: 'guest' },
];

export interface DemoCode {
  key: string;
  name: string;
  design: Code['design'];
  derivation: NewCode['derivation'];
}

export interface DemoRun {
  key: string;
  name: string;
  seed: string;
  framesPerShard: number;
  stopping: Stopping;
  points: { code: string; channel: Channel; decoder: DecoderSpec }[];
}

export interface DemoProject {
  name: string;
  description: string;
  requirements: Requirements;
  codes: DemoCode[];
  runs: DemoRun[];
}

const byBlocks = { kind: 'ldpc', checks: 'blocks' } as const;
const byPoints = { kind: 'ldpc', checks: 'points' } as const;

/** Every code with every decoder over a sweep of the crossover probability. */
const sweep = (codes: string[], kinds: DecoderSpec['kind'][], ps: number[]): DemoRun['points'] =>
  codes.flatMap((code) =>
    kinds.flatMap((kind) =>
      ps.map((p) => ({ code, channel: { kind: 'bsc' as const, p }, decoder: { kind } as DecoderSpec })),
    ),
  );

// Oldest first: lists show the newest first.
export const demoProjects: readonly DemoProject[] = [
  {
    name: 'Buoy uplink',
    description:
      'Short codes for the radio link from a tide-gauge buoy: a reading of 32 bits, a slow channel with bursts of ' +
      'errors when waves wash over the aerial.',
    requirements: {
      summary: 'A reading must arrive whole 999 times in 1000. The buoy has little memory: hard decisions only.',
      channel: { kind: 'gilbert-elliott', pGood: 0.002, pBad: 0.12, goodToBad: 0.01, badToGood: 0.15 },
      targetFer: 1e-3,
      payloadBits: 32,
      lengthMin: 20,
      lengthMax: 150,
      rateMin: 0.45,
      structure: 'any',
    },
    codes: [
      { key: 'sts13', name: 'Triples on 13 points', design: triples(13, 'skolem'), derivation: byPoints },
      { key: 'eg8', name: 'Affine q = 8', design: plane('punctured-affine-plane', 8), derivation: byBlocks },
      { key: 'pg8', name: 'Projective q = 8', design: plane('projective-plane', 8), derivation: byBlocks },
    ],
    runs: [
      {
        key: 'buoy-soft',
        name: 'Short codes, sum-product',
        seed: 'buoy uplink / soft / 1',
        framesPerShard: 5_000,
        stopping: { frameErrors: 100, maxFrames: 50_000 },
        points: sweep(['sts13', 'eg8', 'pg8'], ['sum-product'], [0.005, 0.01, 0.02, 0.03, 0.045]),
      },
      {
        key: 'buoy-hard',
        name: 'Short codes, hard decisions',
        seed: 'buoy uplink / hard / 1',
        framesPerShard: 20_000,
        stopping: { frameErrors: 200, maxFrames: 200_000 },
        points: sweep(['sts13', 'eg8', 'pg8'], ['gallager-b'], [0.003, 0.005, 0.01, 0.02, 0.03, 0.045]),
      },
    ],
  },
  {
    name: 'Shore archive',
    description:
      'High-rate codes for the archive ashore: 4 KiB sectors on a medium of raw bit error rate near 0.4 %, with ' +
      'uncorrectable errors below 10⁻¹⁵ a bit read.',
    requirements: {
      summary: 'A 4 KiB sector is several code words. Cyclic structure is wanted, for a small encoder.',
      channel: { kind: 'bsc', p: 0.004 },
      targetUber: 1e-15,
      payloadBits: 32_768,
      lengthMin: 200,
      lengthMax: 4_200,
      rateMin: 0.69,
      structure: 'cyclic',
    },
    codes: [
      { key: 'eg32', name: 'Affine q = 32', design: plane('punctured-affine-plane', 32), derivation: byBlocks },
      { key: 'pg16', name: 'Projective q = 16', design: plane('projective-plane', 16), derivation: byBlocks },
    ],
    runs: [
      {
        key: 'archive-soft-1023',
        name: 'Affine q = 32, sum-product',
        seed: 'shore archive / affine soft / 1',
        framesPerShard: 500,
        stopping: { frameErrors: 50, maxFrames: 4_000 },
        points: sweep(['eg32'], ['sum-product'], [0.019, 0.02, 0.021, 0.022]),
      },
      {
        key: 'archive-hard-1023',
        name: 'Affine q = 32, hard decisions',
        seed: 'shore archive / affine hard / 1',
        framesPerShard: 20_000,
        stopping: { frameErrors: 200, maxFrames: 400_000 },
        points: [
          ...sweep(['eg32'], ['gallager-b'], [0.009, 0.01, 0.011, 0.012, 0.013, 0.014]),
          ...sweep(['eg32'], ['bit-flipping'], [0.011, 0.012, 0.013, 0.014]),
          ...sweep(['eg32'], ['majority-logic'], [0.005, 0.006, 0.007, 0.008, 0.009]),
        ],
      },
      {
        key: 'archive-soft-273',
        name: 'Projective q = 16, sum-product',
        seed: 'shore archive / projective soft / 1',
        framesPerShard: 2_000,
        stopping: { frameErrors: 100, maxFrames: 30_000 },
        points: sweep(['pg16'], ['sum-product'], [0.018, 0.02, 0.022, 0.025, 0.028]),
      },
      {
        key: 'archive-hard-273',
        name: 'Projective q = 16, hard decisions',
        seed: 'shore archive / projective hard / 1',
        framesPerShard: 20_000,
        stopping: { frameErrors: 200, maxFrames: 400_000 },
        points: [
          ...sweep(['pg16'], ['gallager-b'], [0.01, 0.011, 0.012, 0.014, 0.016, 0.018]),
          ...sweep(['pg16'], ['bit-flipping'], [0.01, 0.011, 0.012, 0.014, 0.016]),
          ...sweep(['pg16'], ['majority-logic'], [0.006, 0.007, 0.008, 0.01, 0.012]),
        ],
      },
    ],
  },
];

function plane(family: string, q: number): Code['design'] {
  return { family, params: { q } };
}

function triples(v: number, method: string): Code['design'] {
  return { family: 'steiner-triple', params: { v, method } };
}
