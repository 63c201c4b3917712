import type { SignOffComment } from '@/api/sign-offs.ts';
import { dateText } from '../runs/RunTitleBlock.tsx';
import { aboutText, type CommentTarget } from './snapshot.ts';

interface Props {
  comments: readonly SignOffComment[];
  targets: readonly CommentTarget[];
}

/** What was said on a sign-off, oldest first, each with what it is about. */
export function CommentList({ comments, targets }: Props) {
  if (comments.length === 0) return <p className="text-quiet">Nobody has commented yet.</p>;
  return (
    <ol className="grid gap-3">
      {comments.map(({ id, about, text, by, at }) => (
        <li key={id} className="min-w-0 border-rule border-l-2 pl-3" id={`comment-${id}`}>
          <p className="text-quiet text-tiny">
            <span className="font-semibold text-ink">{by}</span>, <time dateTime={at}>{dateText(at)}</time>
            {about.kind !== 'whole' && <>, on {aboutText(about, targets)}</>}
          </p>
          <p className="whitespace-pre-wrap [overflow-wrap:anywhere]">{text}</p>
        </li>
      ))}
    </ol>
  );
}
