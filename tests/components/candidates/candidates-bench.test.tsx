import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import { SWRConfig } from 'swr';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { CandidatesBench } from '@/components/candidates/CandidatesBench.tsx';
import { giveElementsSize } from '../sized-elements.ts';
import { candidate, manyCandidates } from './example-candidates.ts';

let restoreSizes: () => void;
let asked: string[] = [];
/** Answers by the beginning of the path; a test puts its own in. */
let answers: Record<string, unknown>;

const requirements = { targetFer: 1e-3, lengthMin: 200, lengthMax: 1100, rateMin: 0.6 };

beforeAll(() => {
  restoreSizes = giveElementsSize(840, 480);
});
afterAll(() => restoreSizes());
beforeEach(() => {
  asked = [];
  history.replaceState(null, '', '/projects/p/candidates');
  const rows = [candidate(), ...manyCandidates(60)];
  answers = {
    '/api/v1/projects/p/requirements': { requirements, updatedAt: null },
    '/api/v1/catalogue/map': { cells: [{ n: 273, rate: 0.7, structure: 'cyclic', count: 1 }], matching: 61 },
    '/api/v1/catalogue?': { candidates: rows, matching: 61, total: 96_757, nearest: [], obstacles: [] },
  };
  vi.stubGlobal('fetch', async (address: string, init?: RequestInit) => {
    asked.push(`${init?.method ?? 'GET'} ${address}`);
    const found = Object.keys(answers).find((path) => address.startsWith(path));
    return found
      ? Response.json(answers[found])
      : Response.json({ error: { code: 'none', message: 'none' } }, { status: 404 });
  });
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const show = (mayKeep = true) =>
  render(
    <SWRConfig value={{ provider: () => new Map(), dedupingInterval: 0 }}>
      <CandidatesBench projectId="p" mayKeep={mayKeep} />
    </SWRConfig>,
  );
const rows = () => screen.getAllByRole('row').filter((row) => row.hasAttribute('aria-rowindex'));
const searches = () => asked.filter((line) => line.startsWith('GET /api/v1/catalogue?'));

describe('a first visit', () => {
  test('takes its window from the requirements, says so, and searches for nothing else before', async () => {
    show();
    await screen.findByText('From requirements.');
    expect(location.search).toBe('?n=200..1100&rate=0.6..');
    expect((screen.getByLabelText('length n') as HTMLInputElement).value).toBe('200..1100');
    await waitFor(() => expect(searches().length).toBeGreaterThan(0));
    for (const search of searches()) expect(search).toContain('n=200..1100');
    expect(screen.getByText(/Not part of the window: the target FER, which runs measure/)).toBeTruthy();
  });

  test('is cleared by one press, and stays clear when the link is opened again', async () => {
    show();
    fireEvent.click(await screen.findByRole('button', { name: 'Clear' }));
    expect(location.search).toBe('?window=open');
    await screen.findByText('The window is open: every construction.');
    cleanup();
    show();
    await screen.findByText('The window is open: every construction.');
    fireEvent.click(screen.getByRole('button', { name: 'Take from requirements' }));
    expect(location.search).toBe('?n=200..1100&rate=0.6..');
  });

  test('without requirements searches everything and says where to state them', async () => {
    answers['/api/v1/projects/p/requirements'] = { requirements: null, updatedAt: null };
    show();
    const stated = await screen.findByRole('link', { name: 'no requirements' });
    expect(stated.getAttribute('href')).toBe('/projects/p/requirements');
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
  });
});

describe('a link', () => {
  test('restores window, order, columns and the chosen candidate', async () => {
    history.replaceState(
      null,
      '',
      '/projects/p/candidates?n=273&sort=girth&columns=n,girth&chosen=projective-plane;q=16;blocks',
    );
    show();
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    expect(screen.getAllByRole('columnheader').map((head) => head.textContent)).toEqual([
      'construction',
      'n',
      'girth ▴',
    ]);
    expect(searches()[0]).toContain('sort=girth');
    expect(rows()[0]!.getAttribute('aria-selected')).toBe('true');
    const panel = screen.getByRole('complementary', { name: 'Chosen candidate' });
    expect(within(panel).getByRole('heading', { name: 'Projective plane PG(2,16)' })).toBeTruthy();
  });

  test('to a candidate further down asks for it by its id', async () => {
    history.replaceState(null, '', '/projects/p/candidates?n=100..&chosen=witt;v=24;blocks');
    answers['/api/v1/catalogue/candidate'] = {
      candidate: candidate({ id: 'witt;v=24;blocks', design: { family: 'witt', params: { v: 24 } } }),
    };
    show();
    await screen.findByRole('heading', { name: 'Witt design, v = 24' });
    expect(asked.some((line) => line.includes('/catalogue/candidate?') && line.includes('n=100..'))).toBe(true);
  });

  test('to a candidate outside its window says so', async () => {
    history.replaceState(null, '', '/projects/p/candidates?n=100..&chosen=witt;v=24;blocks');
    answers['/api/v1/catalogue/candidate'] = { candidate: null };
    show();
    await screen.findByText('The candidate that was chosen does not lie in this window.');
  });
});

describe('the table', () => {
  test('draws the rows in view only and tells how many there are', async () => {
    show();
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    expect(rows().length).toBeLessThan(40);
    expect(screen.getByRole('table').getAttribute('aria-rowcount')).toBe('62');
  });

  test('is walked with the arrow keys', async () => {
    show();
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    const group = screen.getByLabelText('Rows; arrow keys choose one');
    fireEvent.keyDown(group, { key: 'ArrowDown' });
    expect(new URLSearchParams(location.search).get('chosen')).toBe('projective-plane;q=16;blocks');
    fireEvent.keyDown(group, { key: 'ArrowDown' });
    expect(rows()[1]!.getAttribute('aria-selected')).toBe('true');
    fireEvent.keyDown(group, { key: 'Escape' });
    expect(new URLSearchParams(location.search).get('chosen')).toBeNull();
  });

  test('is sorted by its head, of most figures the largest first, then the other way', async () => {
    show();
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    expect(screen.getByRole('columnheader', { name: /distance/ }).getAttribute('aria-sort')).toBe('descending');
    fireEvent.click(screen.getByRole('button', { name: 'rate' }));
    await waitFor(() => expect(searches().at(-1)).toMatch(/sort=rate&descending=true/));
    fireEvent.click(screen.getByRole('button', { name: 'rate' }));
    await waitFor(() => expect(searches().at(-1)).not.toContain('descending'));
  });

  test('takes the columns that are ticked, and those that fit again', async () => {
    show();
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    fireEvent.click(screen.getByRole('checkbox', { name: 'row weight' }));
    expect(new URLSearchParams(location.search).get('columns')).toBe('n,k,rate,distance,rowWeight,standing');
    expect(screen.getByRole('columnheader', { name: 'row weight' })).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'As many as fit' }));
    expect(screen.queryByRole('columnheader', { name: 'row weight' })).toBeNull();
  });
});

describe('the chosen candidate', () => {
  const choose = async () => {
    await waitFor(() => expect(rows().length).toBeGreaterThan(5));
    fireEvent.click(rows()[0]!);
  };

  test('is kept in the project, and its sheet is opened', async () => {
    answers['/api/v1/projects/p/codes'] = {
      job: { id: 'j', kind: 'build-code', state: 'done', codeId: 'c9', error: null },
    };
    const assign = vi.spyOn(location, 'assign').mockImplementation(() => {});
    show();
    await choose();
    fireEvent.click(screen.getByRole('button', { name: 'Keep in this project' }));
    await waitFor(() => expect(assign).toHaveBeenCalledWith('/projects/p/codes/c9'));
    expect(asked).toContain('POST /api/v1/projects/p/codes');
    assign.mockRestore();
  });

  test('that the server refuses to build says why, and can be tried again', async () => {
    answers['/api/v1/projects/p/codes'] = {
      job: {
        id: 'j',
        kind: 'build-code',
        state: 'failed',
        codeId: null,
        error: { code: 'limit', message: 'It is too large.' },
      },
    };
    show();
    await choose();
    fireEvent.click(screen.getByRole('button', { name: 'Keep in this project' }));
    expect((await screen.findByRole('alert')).textContent).toContain('Not kept. It is too large.');
    expect(screen.getByRole('button', { name: 'Keep in this project' })).toBeTruthy();
  });

  test('cannot be kept by one who only reads', async () => {
    show(false);
    await choose();
    expect(screen.queryByRole('button', { name: 'Keep in this project' })).toBeNull();
    expect(screen.getByText('An engineer or the owner can keep it in this project.')).toBeTruthy();
  });
});

test('a window that nothing fits names the theorem in the way and what comes nearest', async () => {
  answers['/api/v1/catalogue?'] = {
    candidates: [],
    matching: 0,
    total: 96_757,
    nearest: [{ givenUp: 'length', direction: 'above', words: 'length 273, above 200', entry: candidate() }],
    obstacles: [
      {
        rule: 'plotkin',
        statement: 'No such code.',
        source: { authors: 'M. Plotkin', year: 1960, title: 'Binary codes with specified minimum distance' },
      },
    ],
  };
  show();
  await screen.findByText('No construction in the catalogue fits this window');
  expect(screen.getByText(/M. Plotkin 1960/)).toBeTruthy();
  expect(screen.getByText('length 273, above 200')).toBeTruthy();
});

test('on a narrow screen rows are cards with an order to choose', async () => {
  restoreSizes();
  restoreSizes = giveElementsSize(328, 480);
  const observed = vi.fn();
  vi.stubGlobal(
    'ResizeObserver',
    class {
      constructor(private readonly told: (entries: { contentRect: { width: number } }[]) => void) {}
      observe() {
        observed();
        this.told([{ contentRect: { width: 328 } }]);
      }
      unobserve() {}
      disconnect() {}
    },
  );
  show();
  await waitFor(() => expect(rows().length).toBeGreaterThan(2));
  expect(observed).toHaveBeenCalled();
  expect(screen.queryByRole('columnheader')).toBeNull();
  expect(rows()[0]!.textContent).toMatch(/PG\(2,16\).*n 273k 191rate 0\.700girth 6/);
  fireEvent.change(screen.getByLabelText('order'), { target: { value: 'n' } });
  await waitFor(() => expect(searches().at(-1)).toContain('sort=n'));
});
