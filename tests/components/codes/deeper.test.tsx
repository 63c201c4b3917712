import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import type { ExamineAnswer } from '@workers/examine/api.ts';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Analysis } from '@/api/analyses.ts';
import { endpoints } from '@/api/endpoints.ts';
import { ApiFailure } from '@/client/api.ts';
import DeeperBench from '@/components/codes/deeper/DeeperBench.tsx';
import { deriveLdpc } from '@/core/codes/ldpc.ts';
import { codeQuestions } from '@/core/codes/questions/index.ts';
import { type CodeQuestionId, codeQuestionIds } from '@/core/codes/questions/question-ids.ts';
import { buildDesign } from '@/core/designs/design.ts';

const { H } = deriveLdpc(buildDesign({ family: 'projective-plane', params: { q: 2 } }), { checks: 'blocks' });

type Ask = (
  question: CodeQuestionId,
  code: unknown,
  options: { seconds: number; signal: AbortSignal; onProgress(share: number): void },
) => Promise<ExamineAnswer>;
const examine = vi.hoisted(() => vi.fn<Ask>());
const call = vi.hoisted(() => vi.fn());
vi.mock('@/client/examine-pool.ts', () => ({ examineCode: examine }));
vi.mock('@/client/code-matrix.ts', () => ({ matrixOf: async () => H }));
vi.mock('@/client/api.ts', async (original) => ({ ...(await original<object>()), call }));

beforeEach(() => {
  examine.mockReset();
  call.mockReset();
});
afterEach(cleanup);

const code = {
  id: 'c',
  fingerprint: 'f',
  design: { family: 'projective-plane', params: { q: 2 } },
  derivation: { kind: 'ldpc', checks: 'blocks' },
} as const;
const outline = { n: 7, k: 3, ones: 21, columnWeights: [[3, 7]] } as const;

const analysis = (part: Partial<Analysis> = {}): Analysis => ({
  id: 'a',
  codeId: 'c',
  question: 'distance',
  seconds: 10,
  state: 'done',
  share: null,
  lines: [],
  histogram: null,
  table: null,
  improved: [],
  listName: null,
  error: null,
  elapsedMs: 1200,
  createdBy: 'A member',
  createdAt: '2026-01-02T03:04:05.000Z',
  ...part,
});

interface Shown {
  questions?: readonly CodeQuestionId[];
  mayKeep?: boolean;
  earlier?: Analysis[];
  given?: Partial<Parameters<typeof DeeperBench>[0]['outline']>;
}
const show = ({ questions = ['distance'], mayKeep = true, earlier = [], given }: Shown = {}) =>
  render(
    <DeeperBench
      code={code}
      outline={{ ...outline, ...given }}
      mayKeep={mayKeep}
      earlier={earlier}
      questions={questions}
    />,
  );
const press = (name: string | RegExp) => fireEvent.click(screen.getByRole('button', { name }));

const answerTo = (id: CodeQuestionId): ExamineAnswer => ({
  ok: true,
  answer: codeQuestions[id].answer({ H }, { seconds: 1 }),
  elapsedMs: 1234,
});

describe('a question to a code', () => {
  test('is asked with the budget chosen, and its answer is shown with grade, method and time', async () => {
    examine.mockResolvedValue(answerTo('distance'));
    show();
    fireEvent.change(screen.getByLabelText('a search may spend'), { target: { value: '60' } });
    press('Compute: Minimum distance');
    const block = await screen.findByRole('region', { name: 'Minimum distance' });
    await within(block).findByText('Took 1.2 s.');
    expect(within(block).getByText(/^(proved|computed)$/)).toBeTruthy();
    const [id, asked, options] = examine.mock.calls[0]!;
    expect([id, options.seconds]).toEqual(['distance', 60]);
    expect(asked).toMatchObject({ H, design: code.design, checks: 'blocks', transforms: [] });
  });

  test('shows how far it is, and is cancelled at once', async () => {
    let signal: AbortSignal | undefined;
    examine.mockImplementation((_id, _code, options) => {
      ({ signal } = options);
      options.onProgress(0.4);
      return new Promise(() => {});
    });
    show();
    press('Compute: Minimum distance');
    await waitFor(() => expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('40'));
    press('Cancel: Minimum distance');
    expect(signal?.aborted).toBe(true);
    expect(screen.queryByRole('progressbar')).toBeNull();
    expect(screen.getByRole('button', { name: 'Compute: Minimum distance' })).toBeTruthy();
  });

  test('that the engine refuses says what is accepted', async () => {
    const message = 'weight distribution: 82 passes the limit of 26 dimensions';
    examine.mockResolvedValue({ ok: false, failure: { code: 'limit', message, data: {} } });
    show();
    press('Compute: Minimum distance');
    expect(await screen.findByText(/limit of 26/)).toBeTruthy();
  });

  test('that does not fit the code has no button, and says for which it is asked', () => {
    show({ questions: ['weights', 'absorbingSets'], given: { n: 273, k: 191, columnWeights: [[17, 273]] } });
    expect(screen.queryAllByRole('button')).toEqual([]);
    expect(screen.getByText(/here the smaller is 82/)).toBeTruthy();
    expect(screen.getByText(/here 17 to 17/)).toBeTruthy();
  });

  test('is offered to viewers to compute, not to keep', () => {
    show({ mayKeep: false, questions: codeQuestionIds });
    expect(screen.getAllByRole('button', { name: /^Compute: / })).toHaveLength(codeQuestionIds.length);
    expect(screen.queryAllByRole('button', { name: /^Compute and keep: / })).toEqual([]);
  });

  test('on encoders takes no budget, and sets gates and memory side by side', async () => {
    examine.mockResolvedValue(answerTo('encoders'));
    show({ questions: ['encoders'] });
    expect(screen.queryByLabelText('a search may spend')).toBeNull();
    press(/^Compute: Encoders/);
    const table = await screen.findByRole('table');
    const heads = within(table).getAllByRole('columnheader');
    expect(heads.map(({ textContent }) => textContent?.replace(/[^\p{L} -]/gu, '').trim())).toEqual([
      'Encoder',
      'Form',
      'XOR gates',
      'AND gates',
      'flip-flops',
      'stored bits',
      'clocks a word',
    ]);
    const rows = within(table).getAllByRole('row').slice(1);
    expect(rows[0]?.textContent).toMatch(/Shift registerregister of the generator polynomial30407/);
    expect(screen.getByText('3 XOR gates, 4 flip-flops, 7 clocks a word')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Download the list' })).toBeTruthy();
  });

  test('on cycles says how many of the shortest pass through a bit', async () => {
    examine.mockResolvedValue(answerTo('cycles'));
    show({ questions: ['cycles'] });
    press('Compute: Cycles');
    expect(await screen.findByText(/cycles of length 6 through a bit: 12, the same through every bit/)).toBeTruthy();
  });
});

describe('an analysis on the server', () => {
  /** Answers each endpoint in turn. */
  const server = (answers: { start?: unknown[]; get?: unknown[] }) => {
    const left = { start: [...(answers.start ?? [])], get: [...(answers.get ?? [])] };
    call.mockImplementation(async (endpoint: unknown) => {
      const next = endpoint === endpoints.startAnalysis ? left.start.shift() : left.get.shift();
      if (next instanceof Error) throw next;
      return next ? { analysis: next } : new Promise(() => {});
    });
  };
  const calls = (endpoint: unknown) => call.mock.calls.filter(([called]) => called === endpoint);

  test('is followed to its end, and says that the sheet tells more', async () => {
    server({
      start: [analysis({ state: 'working', share: 0.25 })],
      get: [analysis({ improved: ['distance', 'lightest'] })],
    });
    show();
    press('Compute and keep: Minimum distance');
    await screen.findByText(/goes on when this page is left/);
    expect(await screen.findByText(/2 properties of the code added or narrowed/, {}, { timeout: 3000 })).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Show on the sheet' })).toBeTruthy();
    expect(calls(endpoints.startAnalysis)[0]![1]).toMatchObject({
      params: { id: 'c' },
      body: { question: 'distance', seconds: 10 },
    });
  });

  test('that told nothing new says so', async () => {
    server({ start: [analysis()] });
    show();
    press('Compute and keep: Minimum distance');
    expect(await screen.findByText(/Nothing new/)).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Show on the sheet' })).toBeNull();
  });

  test('that failed says why', async () => {
    const error = { code: 'interrupted', message: 'The server was restarted while this was being worked on.' };
    server({ start: [analysis({ state: 'failed', error })] });
    show();
    press('Compute and keep: Minimum distance');
    expect(await screen.findByText(/was restarted/)).toBeTruthy();
  });

  test('that the server refuses shows its words', async () => {
    server({ start: [new ApiFailure(409, 'conflict', 'This is being worked on already; wait for it, or cancel it.')] });
    show();
    press('Compute and keep: Minimum distance');
    expect(await screen.findByText(/being worked on already/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Compute: Minimum distance' })).toBeTruthy();
  });

  test('is ended by a cancel', async () => {
    server({ start: [analysis({ state: 'working' })] });
    show();
    press('Compute and keep: Minimum distance');
    await waitFor(() => expect(calls(endpoints.startAnalysis)).toHaveLength(1));
    await screen.findByText(/goes on when this page is left/);
    await waitFor(() => expect(screen.getByRole('progressbar')).toBeTruthy());
    press('Cancel on the server: Minimum distance');
    await waitFor(() => expect(calls(endpoints.cancelAnalysis)[0]![1]).toEqual({ params: { id: 'a' } }));
    expect(screen.queryByRole('progressbar')).toBeNull();
  });

  test('that still works when the page is opened is found again', async () => {
    server({ get: [analysis({ improved: ['distance'] })] });
    show({ earlier: [analysis({ state: 'working', share: 0.5 })] });
    expect(screen.getByRole('progressbar', { name: /On the server/ })).toBeTruthy();
    expect(await screen.findByText(/1 property of the code added or narrowed/, {}, { timeout: 3000 })).toBeTruthy();
  });

  test('kept earlier is told with its time, budget and author, its list and its table', () => {
    const table = { of: 'side by side', columns: ['a', 'b'], rows: [['x', 4] as (string | number)[]] };
    const lines = [{ key: 'distance', label: 'Distance', text: '4', grade: 'computed' as const, method: 'm' }];
    show({ earlier: [analysis({ lines, table, listName: 'words.csv' })] });
    expect(screen.getByText(/Kept 2026-01-02 03:04 UTC by A member, about 10 s to spend, took 1\.2 s/)).toBeTruthy();
    expect(screen.getByRole('link', { name: 'words.csv' }).getAttribute('href')).toBe('/api/v1/analyses/a/list');
    expect(screen.getByRole('table', { name: 'side by side' })).toBeTruthy();
  });
});
