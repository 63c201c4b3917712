import { useEffect, useState } from 'react';
import type { Code } from '@/api/codes.ts';
import { matrixOf } from '@/client/code-matrix.ts';
import type { Words } from '@/core/codes/constant-weight/constant-weight-code.ts';
import { type EnumerativeEncoder, lexicographicOrder, tableEncoder } from '@/core/codes/constant-weight/enumerative.ts';
import { nearestWord } from '@/core/decoders/nearest-word.ts';

/** The words of a kept code, their numbers and their decoder. */
export interface WordBook {
  words: Words;
  /** Place of each word in the list, by number. */
  order: Uint32Array;
  /** Number of each word, by place in the list. */
  rankOf: Uint32Array;
  encoder: EnumerativeEncoder;
  decode: ReturnType<typeof nearestWord>['decode'];
}

export type Opened = { state: 'loading' } | { state: 'open'; book: WordBook } | { state: 'failed'; message: string };

export function useWords({ id, fingerprint }: Pick<Code, 'id' | 'fingerprint'>): Opened {
  const [opened, setOpened] = useState<Opened>({ state: 'loading' });
  useEffect(() => {
    let current = true;
    const show = (next: Opened) => current && setOpened(next);
    matrixOf({ id, fingerprint }).then(
      (matrix) => show({ state: 'open', book: bookOf(matrix) }),
      (error: Error) => show({ state: 'failed', message: error.message }),
    );
    return () => {
      current = false;
    };
  }, [id, fingerprint]);
  return opened;
}

export function bookOf(matrix: Parameters<typeof nearestWord>[0]): WordBook {
  const { rows: M, cols: n, colIndex: ones } = matrix;
  const words: Words = { n, w: M === 0 ? 0 : ones.length / M, M, ones };
  const order = lexicographicOrder(words);
  const rankOf = new Uint32Array(M);
  order.forEach((word, rank) => {
    rankOf[word] = rank;
  });
  return { words, order, rankOf, encoder: tableEncoder(words), decode: nearestWord(matrix).decode };
}
