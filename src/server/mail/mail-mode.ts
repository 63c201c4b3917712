import type { MailMode } from '@/api/notices.ts';
import { isProduction } from '../config.ts';

/** SMTP_URL sends for real; without it local mode keeps mail in a mailbox of its own and production sends none. */
export function mailMode(env: NodeJS.ProcessEnv = process.env): MailMode {
  if (env.SMTP_URL) return 'smtp';
  return isProduction() ? 'off' : 'local';
}
