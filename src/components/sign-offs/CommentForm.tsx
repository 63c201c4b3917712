import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { call } from '@/client/api.ts';
import { Button } from '@/components/ui/Button.tsx';
import { SelectField, TextAreaField } from '@/components/ui/fields.tsx';
import { Notice } from '@/components/ui/Notice.tsx';
import type { CommentTarget } from './snapshot.ts';

interface Props {
  signOffId: string;
  targets: readonly CommentTarget[];
}

/** Says something on the whole, on a property or on a point. */
export default function CommentForm({ signOffId, targets }: Props) {
  const [about, setAbout] = useState('whole');
  const [text, setText] = useState('');
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const send = async () => {
    setBusy(true);
    setFailure(null);
    try {
      const target = targets.find(({ value }) => value === about)!;
      const body = { about: target.about, text };
      const { comment } = await call(endpoints.commentSignOff, { params: { id: signOffId }, body });
      location.hash = `comment-${comment.id}`;
      location.reload();
    } catch (error) {
      setBusy(false);
      setFailure((error as Error).message);
    }
  };
  return (
    <form
      className="mt-4 grid max-w-2xl gap-4"
      aria-label="Comment"
      noValidate
      data-screen-only
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <SelectField
        label="about"
        value={about}
        onChange={(event) => setAbout(event.target.value)}
        choices={targets.map(({ value, label }) => ({ value, label }))}
      />
      <TextAreaField
        label="comment"
        hint="at most 2000 characters; on record for good"
        maxLength={2000}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
      {failure && (
        <Notice kind="fail" word="Not sent" live>
          {failure}
        </Notice>
      )}
      <div>
        <Button type="submit" busy={busy} disabled={text.trim() === ''}>
          Comment
        </Button>
      </div>
    </form>
  );
}
