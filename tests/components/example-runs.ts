import type { Run } from '@/api/runs.ts';

export const exampleRun = (change: Partial<Run> = {}): Run => ({
  id: 'run-1',
  projectId: 'project-1',
  name: 'Planes of order 16',
  seed: 'b7f2-91c4',
  framesPerShard: 2000,
  stopping: { frameErrors: 100, maxFrames: 1_000_000 },
  place: 'browser',
  goal: null,
  outcome: null,
  state: 'finished',
  createdAt: '2026-12-01T05:00:00.000Z',
  createdBy: 'engineer',
  isDemo: false,
  pointCount: 2,
  pointsDone: 1,
  frames: 12_000,
  frameErrors: 503,
  revision: 7,
  ...change,
});
