import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, test } from 'vitest';
import { bookOf } from '@/components/codes/words/use-words.ts';
import { WordCoder } from '@/components/codes/words/WordCoder.tsx';
import { WordTable } from '@/components/codes/words/WordTable.tsx';
import { onesFrom, rankFrom, ranksWith } from '@/components/codes/words/word-search.ts';
import { deriveConstantWeight, wordMatrix } from '@/core/codes/constant-weight/constant-weight-code.ts';
import { buildDesign } from '@/core/designs/design.ts';

afterEach(cleanup);

// The plane of order 4: 21 words of weight 5, distance 8, so 3 errors are corrected and 4 bits carried.
const book = bookOf(wordMatrix(deriveConstantWeight(buildDesign({ family: 'projective-plane', params: { q: 4 } }))));

describe('what is typed', () => {
  test('is places, or all the digits of a word', () => {
    expect(onesFrom('7, 3 3', 21)).toEqual({ ok: true, value: [3, 7] });
    expect(onesFrom('0100000', 7)).toEqual({ ok: true, value: [1] });
    expect(onesFrom('21', 21)).toMatchObject({ ok: false, error: expect.stringContaining('0 to 20') });
  });

  test('is a number that some word has', () => {
    expect(rankFrom('20', 21)).toEqual({ ok: true, value: 20 });
    expect(rankFrom('21', 21)).toMatchObject({ ok: false, error: 'a number from 0 to 20' });
  });
});

describe('the words of the plane of order 4', () => {
  test('are numbered in the order of their ones', () => {
    const words = Array.from(book.order, (word) => Array.from(book.words.ones.subarray(5 * word, 5 * word + 5)));
    for (let i = 1; i < words.length; i++) {
      const at = words[i]!.findIndex((place, j) => place !== words[i - 1]![j]);
      expect(words[i]![at]).toBeGreaterThan(words[i - 1]![at]!);
    }
    expect(Array.from(book.order, (word) => book.rankOf[word])).toEqual([...words.keys()]);
  });

  test('hold two places together once, as lines do', () => {
    for (const [a, b] of [
      [0, 1],
      [3, 17],
      [19, 20],
    ])
      expect(ranksWith(book.words, book.order, [a!, b!])).toHaveLength(1);
    expect(ranksWith(book.words, book.order, [0])).toHaveLength(5);
  });

  test('are listed, and found by places', () => {
    render(<WordTable book={book} />);
    expect(screen.getAllByRole('row')).toHaveLength(22);
    fireEvent.change(screen.getByLabelText(/with ones at/), { target: { value: '0 1' } });
    expect(screen.getAllByRole('row')).toHaveLength(2);
    expect(screen.getByRole('status').textContent).toContain('1 of 21 words');
  });

  test('carry four bits, and come back through three errors', () => {
    render(<WordCoder book={book} radius={3} />);
    fireEvent.change(screen.getByLabelText(/number of a word/), { target: { value: '10' } });
    const encoded = screen.getByRole('region', { name: 'Encoded' });
    expect(encoded.textContent).toContain('1010');
    const sent = Array.from(book.encoder.word(10n));
    const received = [...sent.slice(2), ...[0, 1, 2, 3, 4, 5, 6].filter((p) => !sent.includes(p)).slice(0, 1)];
    fireEvent.change(screen.getByLabelText(/received word/), { target: { value: received.join(' ') } });
    const decoded = screen.getByRole('region', { name: 'Decoded' });
    expect(decoded.textContent).toContain('number 10');
    expect(decoded.textContent).toContain('3 places differ; within 3');
  });

  test('beyond the radius are said to be one of several', () => {
    render(<WordCoder book={book} radius={3} />);
    fireEvent.change(screen.getByLabelText(/received word/), { target: { value: '' } });
    expect(screen.getByRole('region', { name: 'Decoded' }).textContent).toContain(
      'more than 3; other words may be as near',
    );
  });

  test('numbers past the last message carry none', () => {
    render(<WordCoder book={book} radius={3} />);
    fireEvent.change(screen.getByLabelText(/number of a word/), { target: { value: '16' } });
    expect(screen.getByRole('region', { name: 'Encoded' }).textContent).toContain('passes every message');
  });
});
