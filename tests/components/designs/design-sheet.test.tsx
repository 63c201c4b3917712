import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { DesignSheet } from '@/components/designs/DesignSheet.tsx';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import { giveElementsSize } from '../sized-elements.ts';
import { deskHere, opened } from './opened.ts';

let restoreSizes: () => void;
beforeAll(() => {
  restoreSizes = giveElementsSize(800, 420);
});
afterAll(() => restoreSizes());
beforeEach(() => history.replaceState(null, '', '/projects/p/codes/c/design'));
afterEach(cleanup);

function show(family: string, params: DesignSpec['params'], search = '') {
  history.replaceState(null, '', `/projects/p/codes/c/design${search}`);
  return render(<DesignSheet opened={opened(family, params)} desk={deskHere} elapsedMs={40} kept={null} />);
}

const rowOf = (label: string) => screen.getByText(label).closest('div')!;
const text = (element: Element) => element.textContent!.replace(/[\u202f\u00ad]/g, '');

describe('a resolvable triple system', () => {
  test('is drawn as the complete graph, a colour and a line pattern a class, each named beside', async () => {
    const { container } = show('kirkman-triple', { v: 15 });
    const paths = [...container.querySelectorAll('svg path[data-group]')];
    expect(paths).toHaveLength(7);
    const looks = paths.map((path) => `${path.getAttribute('stroke')} ${path.getAttribute('stroke-dasharray')}`);
    expect(new Set(looks).size).toBe(7);
    const lines = paths.reduce((sum, path) => sum + (path.getAttribute('d')!.match(/L/g)?.length ?? 0), 0);
    expect(lines).toBe((15 * 14) / 2);
    for (let group = 0; group < 7; group++)
      expect(screen.getByRole('button', { name: new RegExp(`class ${group}`) })).toBeTruthy();
  });

  test('shows one class alone when its row is pressed, in the drawing, the list and the address', async () => {
    const { container } = show('kirkman-triple', { v: 15 });
    fireEvent.click(screen.getByRole('button', { name: /class 2/ }));
    expect(location.search).toBe('?class=2');
    const strong = [...container.querySelectorAll('path[data-group]')].filter(
      (path) => path.getAttribute('opacity') === '1',
    );
    expect(strong.map((path) => path.getAttribute('data-group'))).toEqual(['2']);
    await screen.findByText('5 blocks of class 2, numbered from 0.');
    fireEvent.click(screen.getByRole('button', { name: 'Show all 7' }));
    expect(location.search).toBe('');
  });

  test('says its resolution is the construction’s own, checked', async () => {
    show('kirkman-triple', { v: 15 });
    fireEvent.click(screen.getByRole('button', { name: 'Compute: resolution' }));
    await waitFor(() => expect(text(rowOf('Resolution'))).toContain('7 parallel classescomputed'));
    expect(text(rowOf('Resolution'))).toContain('Took 12 ms');
  });
});

describe('the list of blocks', () => {
  test('is searched by points, as the address says', async () => {
    show('witt', { v: 12 }, '?through=0+1+2+3+4');
    await screen.findByText('1 of 132 blocks holds points 0, 1, 2, 3, 4.');
    expect(within(screen.getByRole('listbox')).getAllByRole('option')).toHaveLength(1);
  });

  test('refuses a point that is none, naming those that are', async () => {
    show('witt', { v: 12 });
    fireEvent.change(await screen.findByLabelText('through points'), { target: { value: '3 12' } });
    await screen.findByText('points from 0 to 11, with spaces between');
  });

  test('is walked with the arrow keys; the chosen block is written whole and its address kept', async () => {
    show('witt', { v: 12 });
    const list = await screen.findByRole('listbox');
    fireEvent.keyDown(list, { key: 'ArrowDown' });
    fireEvent.keyDown(list, { key: 'ArrowDown' });
    expect(location.search).toBe('?block=1');
    const active = document.getElementById(list.getAttribute('aria-activedescendant')!);
    expect(active?.getAttribute('aria-selected')).toBe('true');
    const detail = screen.getByRole('region', { name: 'Block 1' });
    expect(within(detail).getByText('6 points')).toBeTruthy();
    expect(text(detail)).toContain('1 block not at all');
    fireEvent.keyDown(list, { key: 'End' });
    expect(location.search).toBe('?block=131');
    fireEvent.keyDown(list, { key: 'Escape' });
    expect(location.search).toBe('');
  });
});

describe('what is asked on demand', () => {
  test('comes with grade, method and time', async () => {
    show('projective-plane', { q: 2 });
    for (const name of [
      'block intersections',
      'rank over GF(2)',
      'pasch count',
      'automorphism group',
      'designs like it',
    ])
      fireEvent.click(screen.getByRole('button', { name: `Compute: ${name}` }));
    await waitFor(() => expect(text(rowOf('Block intersections'))).toContain('21 pairs in 1 pointproved'));
    expect(text(rowOf('Rank over GF(2)'))).toContain('4computed');
    expect(text(rowOf('Pasch count'))).toContain('7computed');
    const group = text(rowOf('Auto\u00admorphism group'));
    expect(group).toContain('order 168computed');
    expect(group).toContain('7!/168 = 30, computed');
    expect(text(rowOf('Designs like it'))).toContain('asymptotic estimate, not a count');
  });

  test('that does not fit says what would, and offers no button', () => {
    show('affine-plane', { q: 9 });
    expect(text(rowOf('Auto\u00admorphism group'))).toContain('asked of up to 64 points');
    expect(screen.queryByRole('button', { name: 'Compute: pasch count' })).toBeNull();
  });

  test('can be cancelled while it works, and asked again', async () => {
    let aborted = false;
    const slow = {
      ...deskHere,
      ask: (_opened: unknown, _question: unknown, options: { signal?: AbortSignal } = {}) =>
        new Promise<never>((_, reject) => {
          options.signal?.addEventListener('abort', () => {
            aborted = true;
            reject(options.signal!.reason);
          });
        }),
    };
    render(<DesignSheet opened={opened('projective-plane', { q: 2 })} desk={slow} elapsedMs={1} kept={null} />);
    fireEvent.click(screen.getByRole('button', { name: 'Compute: pasch count' }));
    await screen.findByRole('progressbar', { name: 'Computing: pasch count' });
    fireEvent.click(screen.getByRole('button', { name: 'Cancel: pasch count' }));
    expect(aborted).toBe(true);
    await screen.findByRole('button', { name: 'Compute: pasch count' });
  });

  test('a search that ends at its budget says so, and can go on with more', async () => {
    const stopped = {
      ...deskHere,
      ask: ((design, question, options = {}) =>
        deskHere.ask(design, question, { ...options, limit: 300 })) as typeof deskHere.ask,
    };
    render(
      <DesignSheet
        opened={opened('steiner-triple', { v: 33, method: 'bose' })}
        desk={stopped}
        elapsedMs={1}
        kept={null}
      />,
    );
    fireEvent.click(screen.getByRole('button', { name: 'Compute: resolution' }));
    await screen.findByText('not decided');
    expect(text(rowOf('Resolution'))).toContain('proves nothing either way');
    expect(screen.getByRole('button', { name: 'Search again' })).toBeTruthy();
  });
});

describe('a design that is no 2-design', () => {
  test('is drawn as points against blocks, a dot for each point of each block', () => {
    const { container } = show('steiner-quadruple', { v: 8 });
    const dots = [...container.querySelectorAll('g[data-group] path[stroke-linecap]')]
      .map((path) => path.getAttribute('d')!.match(/h0/g)!.length)
      .reduce((a, b) => a + b);
    expect(dots).toBe(14 * 4);
  });
});

test('a certificate that differs from the one kept is said aloud', () => {
  const kept = { holds: true, t: 2, lambda: 1, v: 13, k: 4, b: 13, r: 4, method: 'counted' };
  render(<DesignSheet opened={opened('projective-plane', { q: 2 })} desk={deskHere} elapsedMs={1} kept={kept} />);
  expect(screen.getByText(/states other parameters/)).toBeTruthy();
});
