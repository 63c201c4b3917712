import { describe, expect, it } from 'vitest';
import { mergeRunEvent } from '@/client/merge-run-event.ts';
import { paceOf } from '@/client/use-pace.ts';
import { examplePoint } from '../components/example-points.ts';
import { exampleRun } from '../components/example-runs.ts';

describe('what an event tells of a run', () => {
  const [a, b] = [examplePoint({ id: 'a' }), examplePoint({ id: 'b' })];
  const known = { run: exampleRun({ revision: 7 }), points: [a, b], omitted: 0 };

  it('replaces the points that changed, in their places, and adds those that the planner added', () => {
    const changed = { ...a, done: true };
    const added = examplePoint({ id: 'c' });
    const run = exampleRun({ revision: 8 });
    expect(mergeRunEvent(known, { run, points: [added, changed] })).toEqual({
      ...{ run, points: [changed, b, added], omitted: 0 },
    });
  });

  it('of a run of which only some points are known adds none', () => {
    const run = exampleRun({ revision: 8 });
    const event = { run, points: [{ ...a, done: true }, examplePoint({ id: 'c' })] };
    expect(mergeRunEvent({ ...known, omitted: 9 }, event).points.map(({ id }) => id)).toEqual(['a', 'b']);
  });

  it('of a change of the run alone keeps the points as they are, so that nothing is drawn anew', () => {
    expect(mergeRunEvent(known, { run: exampleRun({ revision: 8 }), points: [] }).points).toBe(known.points);
  });

  it('from before what is known changes nothing', () => {
    expect(mergeRunEvent(known, { run: exampleRun({ revision: 6 }), points: [] })).toBe(known);
  });
});

describe('the pace of a run that others work on', () => {
  it('is that of the frames seen come in, and tells the time left', () => {
    const seen = [0, 1, 2].map((second) => ({ at: second * 1000, frames: second * 500 }));
    expect(paceOf(seen, 2000)).toEqual({ framesPerSecond: 500, timeLeftMs: 4000 });
  });

  it('is not told from fewer than three sightings, nor time without frames', () => {
    expect(paceOf([{ at: 0, frames: 0 }], 10)).toEqual({ framesPerSecond: 0, timeLeftMs: null });
    const still = [0, 1, 2].map((at) => ({ at, frames: 5 }));
    expect(paceOf(still, 10).timeLeftMs).toBeNull();
  });
});
