import type { Code } from '@/api/codes.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { useWords } from './use-words.ts';
import { WordCoder } from './WordCoder.tsx';
import { WordTable } from './WordTable.tsx';

interface Props {
  code: Pick<Code, 'id' | 'fingerprint'>;
  /** Errors that decoding to the nearest word always corrects. */
  radius: number;
}

/** The words of a constant-weight code: encoded and decoded by number, listed and searched. */
export default function WordBench({ code, radius }: Props) {
  const opened = useWords(code);
  if (opened.state === 'failed') {
    return (
      <Notice kind="fail" word="Not listed" live>
        {opened.message}
      </Notice>
    );
  }
  if (opened.state === 'loading') return <p className="text-quiet">Fetching the words …</p>;
  return (
    <div className="grid gap-8">
      <WordCoder book={opened.book} radius={radius} />
      <WordTable book={opened.book} />
    </div>
  );
}
