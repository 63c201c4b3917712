import { useState } from 'react';
import { TextField } from '@/components/ui/fields.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { TitleBlock, type TitleRow } from '@/components/ui/TitleBlock.tsx';
import { wordOf } from '@/core/codes/constant-weight/constant-weight-code.ts';
import type { WordBook } from './use-words.ts';
import { onesFrom, rankFrom } from './word-search.ts';

interface Props {
  book: WordBook;
  radius: number;
}

/** A number to its word, and what was received to the nearest word and its number. */
export function WordCoder({ book, radius }: Props) {
  const [number, setNumber] = useState('0');
  const [received, setReceived] = useState(() => Array.from(wordOf(book.words, book.order[0]!)).join(' '));
  const rank = rankFrom(number, book.words.M);
  const ones = onesFrom(received, book.words.n);
  return (
    <section aria-labelledby="coder" className="min-w-0">
      <h2 id="coder" className="mb-2">
        Encode and decode
      </h2>
      <div className="grid items-start gap-x-6 gap-y-5 lg:grid-cols-2">
        <div className="grid gap-3">
          <TextField
            label="number of a word"
            hint={`from 0 to ${wholeNumber(book.words.M - 1)}`}
            inputMode="numeric"
            autoComplete="off"
            value={number}
            error={rank.ok ? null : rank.error}
            onChange={(event) => setNumber(event.target.value)}
          />
          {rank.ok && rank.value !== null && (
            <div role="status">
              <TitleBlock title="Encoded" rows={encodedRows(book, rank.value)} />
            </div>
          )}
        </div>
        <div className="grid gap-3">
          <TextField
            label="received word"
            hint="places of its ones, or all its digits"
            autoComplete="off"
            spellCheck={false}
            value={received}
            error={ones.ok ? null : ones.error}
            onChange={(event) => setReceived(event.target.value)}
          />
          {ones.ok && (
            <div role="status">
              <TitleBlock title="Decoded" rows={decodedRows(book, ones.value, radius)} />
            </div>
          )}
        </div>
      </div>
    </section>
  );
}

const messageOf = ({ encoder }: WordBook, rank: number): string => {
  const { messageBits } = encoder;
  if (rank >= 2 ** messageBits) return 'none; the number passes every message';
  return messageBits === 0 ? 'of no bits' : rank.toString(2).padStart(messageBits, '0');
};

function encodedRows(book: WordBook, rank: number): TitleRow[] {
  const { words, order } = book;
  const ones = wordOf(words, order[rank]!);
  return [
    { label: 'Message', value: <Digits text={messageOf(book, rank)} /> },
    { label: 'Ones at', value: <Digits text={Array.from(ones).join(' ')} /> },
    { label: 'Word', value: <Digits text={digitsOf(ones, words.n)} /> },
  ];
}

function decodedRows(book: WordBook, ones: readonly number[], radius: number): TitleRow[] {
  const { words, order, rankOf } = book;
  const bits = new Uint8Array(words.n);
  for (const place of ones) bits[place] = 1;
  const { index, distance } = book.decode(bits);
  const rank = rankOf[index]!;
  return [
    { label: 'Nearest word', value: `number ${wholeNumber(rank)}`, note: verdict(distance, radius) },
    { label: 'Message', value: <Digits text={messageOf(book, rank)} /> },
    { label: 'Ones at', value: <Digits text={Array.from(wordOf(words, order[rank]!)).join(' ')} /> },
  ];
}

function verdict(distance: number, radius: number): string {
  if (distance === 0) return 'it is a word of the code';
  const errors = `${counted(distance, 'place')} differ${distance === 1 ? 's' : ''}`;
  if (distance <= radius) return `${errors}; within ${radius}, so no other word is as near`;
  return `${errors}, more than ${radius}; other words may be as near, of which the first in the list is given`;
}

/** What a line can hold of a long word. */
const MOST_DIGITS = 2048;

function Digits({ text }: { text: string }) {
  const shown = text.length > MOST_DIGITS ? `${text.slice(0, MOST_DIGITS)} …` : text;
  return <span className="break-all font-mono font-normal text-tiny">{shown}</span>;
}

function digitsOf(ones: Uint32Array, n: number): string {
  const digits = new Array<string>(n).fill('0');
  for (const place of ones) digits[place] = '1';
  return digits.join('');
}
