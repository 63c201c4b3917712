import { render, screen, within } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { groundFrom } from '@/components/shell/ground.ts';
import { type Lattice, planeOfOrder2, planeOfOrder3 } from '@/components/shell/lattice.ts';
import { Ruler } from '@/components/shell/Ruler.tsx';
import { entryPath, stationsOf } from '@/components/shell/stations.ts';

const project = {
  id: 'p1',
  counts: { requirements: 1, codes: 4, runs: 7, runsUnderWay: 1, signOffs: 3, signOffsOpen: 1, releases: 2 },
};
const none = { requirements: 0, codes: 0, runs: 0, runsUnderWay: 0, signOffs: 0, signOffsOpen: 0, releases: 0 };

describe('the ruler', () => {
  test('has the seven steps in order, the present one marked', () => {
    render(<Ruler stations={stationsOf(project)} current="runs" />);
    const items = within(screen.getByRole('navigation')).getAllByRole('listitem');
    expect(items.map((item) => item.querySelector('.font-semibold')?.textContent)).toEqual([
      'Requirements',
      'Candidates',
      'Codes',
      'Runs',
      'Compare',
      'Sign-off',
      'Release',
    ]);
    expect(screen.getByRole('link', { current: 'page' }).textContent).toBe('Runs1 of 7 under way');
  });

  test('every step has a page, and says how it stands', () => {
    expect(stationsOf(project).filter((station) => !station.href)).toEqual([]);
    const states = (of: typeof project) => stationsOf(of).map((station) => station.state);
    expect(states(project).slice(5)).toEqual(['1 open', '2 frozen']);
    expect(states({ id: 'p1', counts: none }).slice(5)).toEqual(['none asked for', 'none yet']);
  });

  test('a project is entered at the first step not yet done', () => {
    expect(entryPath({ id: 'p1', counts: none })).toBe('/projects/p1/requirements');
    expect(entryPath({ id: 'p1', counts: { ...none, requirements: 1 } })).toBe('/projects/p1/codes');
    expect(entryPath(project)).toBe('/projects/p1/runs');
    expect(entryPath({ id: 'p1', counts: { ...project.counts, runsUnderWay: 0 } })).toBe('/projects/p1/compare');
  });
});

describe('the mark', () => {
  test.each([
    ['order 2', planeOfOrder2, 3],
    ['order 3', planeOfOrder3, 4],
  ] as [string, Lattice, number][])(
    'is a plane of %s: any two lines meet in one point',
    (_, { size, cells }, perLine) => {
      const lines = Array.from({ length: size }, (_, y) =>
        cells.filter((cell) => cell[1] === y).map((cell) => cell[0]),
      );
      for (const line of lines) expect(line.length).toBe(perLine);
      for (let i = 0; i < size; i++) {
        for (let j = 0; j < i; j++) expect(lines[i]!.filter((x) => lines[j]!.includes(x)).length).toBe(1);
      }
    },
  );
});

test('an unknown ground follows the system', () => {
  expect([undefined, 'paper', 'blueprint', 'neon'].map(groundFrom)).toEqual(['system', 'paper', 'blueprint', 'system']);
});
