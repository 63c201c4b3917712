import { useState } from 'react';
import { endpoints } from '@/api/endpoints.ts';
import { type NoticeChoices, type NoticeKind, noticeKinds } from '@/api/notices.ts';
import { call } from '@/client/api.ts';
import { useApi } from '@/client/hooks.ts';
import { MailModeNote } from '@/components/notices/MailModeNote.tsx';
import { Button } from '@/components/ui/Button.tsx';
import { Notice } from '@/components/ui/Notice.tsx';

/** Which notices come by e-mail as well; every one is shown in the app. Each box is saved as it is ticked. */
export default function NoticeChoicesForm({ first }: { first: NoticeChoices }) {
  const { data = first, mutate } = useApi(endpoints.getNoticeChoices, {}, { fallbackData: first });
  const [failure, setFailure] = useState<string | null>(null);
  const choose = async (kind: NoticeKind, byMail: boolean) => {
    setFailure(null);
    try {
      await mutate(call(endpoints.putNoticeChoices, { body: { choices: [{ kind, byMail }] } }), {
        optimisticData: {
          ...data,
          choices: data.choices.map((one) => (one.kind === kind ? { kind, byMail } : one)),
        },
        revalidate: false,
      });
    } catch (error) {
      setFailure(error instanceof Error ? error.message : String(error));
    }
  };
  return (
    <div className="grid max-w-prose gap-3">
      <MailModeNote mail={data.mail} />
      <fieldset>
        <legend className="mb-1 text-quiet text-tiny">by e-mail, beside the list in the app</legend>
        <ul className="border-rule border-t">
          {data.choices.map(({ kind, byMail }) => (
            <li key={kind} className="border-rule border-b">
              <label className="flex min-h-9 cursor-pointer items-center gap-3 py-1.5">
                <input
                  type="checkbox"
                  className="size-4 accent-act"
                  checked={byMail}
                  onChange={(event) => void choose(kind, event.target.checked)}
                />
                {noticeKinds[kind]}
              </label>
            </li>
          ))}
        </ul>
      </fieldset>
      {failure && (
        <Notice kind="fail" word="Not saved" live action={<Button onClick={() => mutate()}>Look again</Button>}>
          {failure}
        </Notice>
      )}
    </div>
  );
}
