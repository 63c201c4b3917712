import type { MailMode } from '@/api/notices.ts';
import { Notice } from '@/components/ui/Notice.tsx';
import { paths } from '@/paths.ts';

/** Said wherever something would be sent: that mail is off, or that it goes no further than this machine. */
export function MailModeNote({ mail }: { mail: MailMode }) {
  if (mail === 'smtp') return null;
  if (mail === 'off') {
    return (
      <Notice kind="caution" word="Mail is off">
        This server has no SMTP_URL and sends nothing. Notices are shown in the app alone; what is chosen here counts
        once mail is on.
      </Notice>
    );
  }
  return (
    <Notice kind="note" word="Local mode">
      Mail goes no further than{' '}
      <a className="link" href={paths.mailbox}>
        this server’s own mailbox
      </a>
      . SMTP_URL sends it out.
    </Notice>
  );
}
