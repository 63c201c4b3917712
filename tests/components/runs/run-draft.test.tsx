import { describe, expect, it } from 'vitest';
import { numberOf } from '@/components/runs/number-of.ts';
import { emptyDraft, judgeDraft, type RunDraft, serverErrors } from '@/components/runs/run-draft.ts';
import { proposedFramesPerShard, proposedName, proposedSweep } from '@/components/runs/run-proposals.ts';
import { prefilled } from '@/components/runs/use-run-draft.ts';

const draft = (change: Partial<RunDraft> = {}): RunDraft => ({
  ...emptyDraft(),
  codeIds: ['c1', 'c2'],
  seed: 'a seed',
  ...change,
});

describe('a run in the form', () => {
  it('becomes codes × decoders × channel points', () => {
    const chosen = draft();
    chosen.decoders['sum-product'].isChosen = true;
    const { run, points, mostShards } = judgeDraft(chosen, 'a name');
    expect(points).toBe(2 * 2 * 5);
    expect(mostShards).toBe(20 * 500);
    expect(run?.points[0]).toEqual({
      codeId: 'c1',
      channel: { kind: 'bsc', p: 0.03 },
      decoder: { kind: 'gallager-b', iterations: 20 },
    });
    expect(run).toMatchObject({ name: 'a name', place: 'browser', stopping: { frameErrors: 100, maxFrames: 1e6 } });
  });

  it('takes numbers as people type them', () => {
    expect(numberOf('1 000 000')).toBe(1e6);
    expect(numberOf('1e8')).toBe(1e8);
    expect(numberOf('')).toBeNaN();
    expect(judgeDraft(draft({ maxFrames: '1e9' }), 'x').run?.stopping.maxFrames).toBe(1e9);
  });

  it.each([
    ['framesPerShard', '0', 'framesPerShard'],
    ['framesPerShard', '1.5', 'framesPerShard'],
    ['frameErrors', '0', 'frameErrors'],
    ['seconds', '0.5', 'seconds'],
    ['maxFrames', '1e13', 'maxFrames'],
    ['from', '0.6', 'from'],
    ['to', '0', 'to'],
    ['count', '0', 'count'],
    ['count', '201', 'count'],
    ['seed', '', 'seed'],
  ] as const)('with %s = "%s" is refused at that field, which says what would be accepted', (field, text, at) => {
    const { run, errors } = judgeDraft(draft({ [field]: text }), 'x');
    expect(run).toBeNull();
    expect(errors[at]).toMatch(/^(a|at|crossover) /);
  });

  it('without a number of errors ends its points at their frames, and with seconds the run in time', () => {
    const { run } = judgeDraft(draft({ frameErrors: '', seconds: '60' }), 'x');
    expect(run?.stopping).toEqual({ maxFrames: 1e6, seconds: 60 });
  });

  it('names a bad parameter of a decoder at that decoder', () => {
    const chosen = draft();
    chosen.decoders['gallager-b'] = {
      isChosen: true,
      iterations: '0',
      threshold: 'x',
      designP: '',
      schedule: 'layered',
      scale: '',
      c: '',
      rMax: '',
    };
    const { errors } = judgeDraft(chosen, 'x');
    expect(Object.keys(errors).sort()).toEqual(['gallager-b.iterations', 'gallager-b.threshold']);
  });

  it('with a list refuses words and p outside (0, 0.5]', () => {
    expect(judgeDraft(draft({ sweep: 'listed', list: '0.02 0.01' }), 'x').sweep).toEqual([0.02, 0.01]);
    for (const list of ['', 'abc', '0.7', '0 0.01'])
      expect(judgeDraft(draft({ sweep: 'listed', list }), 'x').errors.list).toContain('crossover');
  });

  it('without codes or decoders says so there and nowhere else', () => {
    const bare = draft({ codeIds: [] });
    bare.decoders['gallager-b'].isChosen = false;
    expect(Object.keys(judgeDraft(bare, '').errors).sort()).toEqual(['codeIds', 'decoders']);
  });

  it('shows refusals of the server at the fields they belong to', () => {
    const { run } = judgeDraft(draft(), 'x');
    expect(
      serverErrors(
        { framesPerShard: 'at most 9', 'points.3.codeId': 'a code', 'points.0.decoder.threshold': 'at most 17' },
        run!,
      ),
    ).toEqual({ framesPerShard: 'at most 9', codeIds: 'a code', 'gallager-b.threshold': 'at most 17' });
  });
});

describe('what the form proposes', () => {
  it('is a shard of about two million bits', () => {
    expect(proposedFramesPerShard([{ n: 273 }])).toBe(5000);
    expect(proposedFramesPerShard([{ n: 273 }, { n: 4161 }])).toBe(200);
    expect(proposedFramesPerShard([{ n: 10_000_000 }])).toBe(1);
  });

  it('is a sweep that ends at the required channel point', () => {
    expect(proposedSweep({ channel: { kind: 'bsc', p: 0.004 }, targetFer: 1e-6 })).toEqual({
      from: '0.012',
      to: '0.004',
    });
    expect(proposedSweep(null)).toBeNull();
  });

  it('is a name made of codes and decoders', () => {
    expect(proposedName(draft({ codeIds: ['c1'] }), [{ id: 'c1', name: 'PG(2,16)' }])).toBe('PG(2,16): Gallager B');
  });

  it('follows the address', () => {
    expect(prefilled('?code=a&code=b').codeIds).toEqual(['a', 'b']);
    const { decoders } = prefilled('?decoder=sum-product,majority-logic');
    expect(decoders?.['sum-product'].isChosen).toBe(true);
    expect(decoders?.['gallager-b'].isChosen).toBe(false);
  });
});

describe('a goal in the form', () => {
  it('of a curve is every code with every decoder, its points left to the planner', () => {
    const chosen = draft({ points: 'curve', from: '0.02', to: '0.004', mostPoints: '9' });
    chosen.decoders['sum-product'].isChosen = true;
    const { run, points, errors } = judgeDraft(chosen, 'x');
    expect([points, errors]).toEqual([0, {}]);
    expect(run).toMatchObject({ goal: { kind: 'curve', from: 0.02, to: 0.004, points: 9 }, points: [] });
    expect(run?.goal?.kind === 'curve' && run.goal.curves).toHaveLength(4);
    expect(judgeDraft(draft({ points: 'curve', from: '0.001', to: '0.004' }), 'x').errors.from).toMatch(
      /above the last/,
    );
    expect(judgeDraft(draft({ points: 'curve', mostPoints: '1' }), 'x').errors.mostPoints).toMatch(/from 2 to 200/);
  });

  it('of a limit is for one code and one decoder, that does not know p', () => {
    const limit = (change: Partial<RunDraft> = {}) => draft({ points: 'limit', codeIds: ['c1'], ...change });
    expect(judgeDraft(limit(), 'x').run?.goal).toEqual({
      kind: 'limit',
      codeId: 'c1',
      decoder: { kind: 'gallager-b', iterations: 20 },
      ...{ p: 0.01, rate: 'fer', target: 1e-9, level: 0.95 },
    });
    const { errors } = judgeDraft(draft({ points: 'limit', limitTarget: '2', limitLevel: '1' }), 'x');
    expect(Object.keys(errors).sort()).toEqual(['codeIds', 'limitLevel', 'limitTarget']);
    const soft = limit();
    soft.decoders['gallager-b'].isChosen = false;
    soft.decoders['sum-product'].isChosen = true;
    expect(judgeDraft(soft, 'x').errors['sum-product.designP']).toMatch(/stated p/);
  });
});
