import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, test } from 'vitest';
import { weightText } from '@/components/codes/WeightCharts.tsx';
import { DataTable } from '@/components/ui/DataTable.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { Grade } from '@/components/ui/Grade.tsx';
import { Progress } from '@/components/ui/Progress.tsx';

afterEach(cleanup);

describe('evidence grades', () => {
  test.each([
    ['proved', 'rect'],
    ['computed', 'circle[fill="currentColor"]'],
    ['bounded', 'path'],
    ['sampled', 'circle[stroke-dasharray]'],
  ] as const)('%s is a word and a shape of its own', (grade, shape) => {
    const { container } = render(<Grade grade={grade} />);
    expect(container.textContent).toBe(grade);
    expect(container.querySelector(shape)).not.toBeNull();
  });
});

describe('a field', () => {
  test('ties its error to the control, in place of the hint', () => {
    render(<TextField label="order q" hint="a prime power" error="accepted is a prime power from 2 to 256" />);
    const input = screen.getByLabelText('order q');
    expect(input.getAttribute('aria-invalid')).toBe('true');
    const note = document.getElementById(input.getAttribute('aria-describedby')!);
    expect(note?.textContent).toBe('Not accepted: accepted is a prime power from 2 to 256');
  });
});

describe('a table', () => {
  const rows = [
    { id: 'a', n: 273 },
    { id: 'b', n: 73 },
    { id: 'c', n: 1057 },
  ];

  test('sorts numbers by value, upwards first, and says so', () => {
    render(
      <DataTable
        caption="codes"
        rows={rows}
        rowKey={(row) => row.id}
        columns={[{ key: 'n', header: 'n', kind: 'number', sortBy: (row) => row.n, cell: (row) => row.n }]}
      />,
    );
    const shown = () => screen.getAllByRole('cell').map((cell) => cell.textContent);
    fireEvent.click(screen.getByRole('button', { name: 'n' }));
    expect(shown()).toEqual(['73', '273', '1057']);
    expect(screen.getByRole('columnheader').getAttribute('aria-sort')).toBe('ascending');
    fireEvent.click(screen.getByRole('button', { name: 'n' }));
    expect(shown()).toEqual(['1057', '273', '73']);
  });
});

test('progress tells its share, and none while the end is unknown', () => {
  const { rerender } = render(<Progress label="build" value={0.62} />);
  expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('62');
  rerender(<Progress label="build" value={null} />);
  expect(screen.getByRole('progressbar').hasAttribute('aria-valuenow')).toBe(false);
});

test('weights are said in words', () => {
  expect(weightText([[17, 273]], 'row')).toBe('Every row has weight 17 (273 rows).');
  expect(
    weightText(
      [
        [3, 12],
        [4, 40],
      ],
      'column',
    ),
  ).toBe('Columns: 12 of weight 3, 40 of weight 4.');
  expect(weightText([], 'row')).toBe('No rows.');
});
