import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { vectorQueryParams } from '@/api/releases.ts';
import { Checks } from '@/components/releases/Checks.tsx';
import { sizeText } from '@/components/releases/size-text.ts';
import { decodersFor, emptyVectorDraft, judgeVectors, type VectorDraft } from '@/components/releases/vector-draft.ts';

afterEach(cleanup);

const draft = (part: Partial<VectorDraft>): VectorDraft => ({ ...emptyVectorDraft, ...part });
const channel = (channelKind: VectorDraft['channel']['channelKind'], params: Record<string, string>) => ({
  channel: { ...emptyVectorDraft.channel, channelKind, channel: params },
});

describe('test vectors as typed', () => {
  test('make a request that the interface accepts', () => {
    const judged = judgeVectors(draft({ decoders: ['gallager-b', 'majority-logic'], iterations: '7' }));
    if (!judged.ok) throw new Error(JSON.stringify(judged.fields));
    expect(judged.request.decoders).toEqual([{ kind: 'gallager-b', iterations: 7 }, { kind: 'majority-logic' }]);
    const { channel: noise, decoders, count, seed } = judged.request;
    const query = {
      form: 'hex',
      seed,
      count: String(count),
      channel: JSON.stringify(noise),
      decoders: JSON.stringify(decoders),
    };
    expect(vectorQueryParams.parse(query)).toMatchObject(judged.request);
  });

  test('offer the decoders that read the channel, and drop those that do not', () => {
    expect(decodersFor('bec')).toEqual(['peeling', 'elimination']);
    expect(decodersFor('awgn')).toEqual(['sum-product', 'min-sum']);
    const judged = judgeVectors(draft({ ...channel('bec', { e: '0.1' }), decoders: ['gallager-b', 'peeling'] }));
    expect(judged).toMatchObject({ ok: true, request: { decoders: [{ kind: 'peeling' }] } });
  });

  test.each([
    [{ count: '0' }, 'count'],
    [{ count: 'many' }, 'count'],
    [{ seed: '' }, 'seed'],
    [{ iterations: '5000' }, 'iterations'],
    [{ decoders: [] }, 'decoders'],
    [channel('bsc', { p: '0.7' }), 'channel.p'],
    [channel('bsc', {}), 'channel.p'],
  ])('%j say at the field what would be accepted', (part, field) => {
    const judged = judgeVectors(draft(part as Partial<VectorDraft>));
    expect(judged.ok ? {} : judged.fields).toHaveProperty([field]);
  });
});

test('ticked boxes come in the order of the list, whatever the order of ticking', () => {
  const onChange = vi.fn();
  const choices = [
    { id: 'a', title: 'first' },
    { id: 'b', title: 'second' },
  ];
  render(<Checks legend="Files" choices={choices} chosen={['b']} onChange={onChange} />);
  fireEvent.click(screen.getByLabelText('first'));
  expect(onChange).toHaveBeenCalledWith(['a', 'b']);
});

test('sizes are written in decimal units', () => {
  expect([sizeText(812), sizeText(41_300), sizeText(2_000_000)].map((text) => text.replace('\u202f', ' '))).toEqual([
    '812 bytes',
    '41.3 kB',
    '2.0 MB',
  ]);
});
