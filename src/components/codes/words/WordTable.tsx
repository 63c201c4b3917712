import { useDeferredValue, useMemo, useState } from 'react';
import { Button } from '@/components/ui/Button.tsx';
import { TextField } from '@/components/ui/fields.tsx';
import { counted, wholeNumber } from '@/components/ui/numbers.ts';
import { wordOf } from '@/core/codes/constant-weight/constant-weight-code.ts';
import type { WordBook } from './use-words.ts';
import { onesFrom, ranksWith } from './word-search.ts';

const PAGE = 50;
/** What a line can hold; the file has them whole. */
const MOST_ONES = 80;

/** The words by number, found by places of their ones. */
export function WordTable({ book }: { book: WordBook }) {
  const { words, order } = book;
  const [typed, setTyped] = useState('');
  const [from, setFrom] = useState(0);
  const places = onesFrom(typed, words.n);
  const wanted = useDeferredValue(places.ok ? places.value.join(' ') : '');
  const ranks = useMemo(
    () => ranksWith(words, order, wanted.split(' ').filter(Boolean).map(Number)),
    [words, order, wanted],
  );
  const first = Math.min(from, Math.max(0, PAGE * Math.floor((ranks.length - 1) / PAGE)));
  const last = Math.min(ranks.length, first + PAGE);
  return (
    <section aria-labelledby="words" className="min-w-0">
      <h2 id="words" className="mb-2">
        Word list
      </h2>
      <TextField
        className="mb-3 max-w-100"
        label="with ones at"
        placeholder="3 17"
        autoComplete="off"
        spellCheck={false}
        value={typed}
        error={places.ok ? null : places.error}
        onChange={(event) => {
          setTyped(event.target.value);
          setFrom(0);
        }}
      />
      <div className="mb-1 flex flex-wrap items-center justify-between gap-x-4 gap-y-2">
        <p role="status" className="text-quiet text-tiny">
          {wanted === ''
            ? `${counted(words.M, 'word')}, numbered from 0 in the order of their ones.`
            : `${wholeNumber(ranks.length)} of ${counted(words.M, 'word')}.`}
        </p>
        {ranks.length > PAGE && (
          <span className="flex items-center gap-2 text-tiny">
            <Button size="small" disabled={first === 0} onClick={() => setFrom(first - PAGE)}>
              Earlier
            </Button>
            {wholeNumber(first + 1)} to {wholeNumber(last)}
            <Button size="small" disabled={last === ranks.length} onClick={() => setFrom(first + PAGE)}>
              Later
            </Button>
          </span>
        )}
      </div>
      {ranks.length === 0 ? (
        <p className="border-ink border-t border-b py-3 text-quiet">No word has ones at all of these places.</p>
      ) : (
        <table className="w-full border-ink border-t border-b">
          <thead>
            <tr className="text-left text-quiet text-tiny">
              <th scope="col" className="w-24 py-1 pr-4 text-right font-normal">
                number
              </th>
              <th scope="col" className="py-1 font-normal">
                ones at
              </th>
            </tr>
          </thead>
          <tbody className="font-mono text-tiny">
            {Array.from(ranks.subarray(first, last), (rank) => (
              <tr key={rank} className="border-hair border-t align-baseline">
                <th scope="row" className="py-1 pr-4 text-right font-normal text-quiet">
                  {wholeNumber(rank)}
                </th>
                <td className="py-1 [overflow-wrap:anywhere]">{lineOf(wordOf(words, order[rank]!))}</td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
    </section>
  );
}

function lineOf(ones: Uint32Array): string {
  const text = ones.subarray(0, MOST_ONES).join(' ');
  return ones.length > MOST_ONES ? `${text} …` : text;
}
