import type { NoticeKind } from '@/api/notices.ts';

/** What an e-mail says, before it is text: paths instead of links, because the address of this site may change between
 *  the cause of a letter and its sending. */
export interface Letter {
  subject: string;
  /** By what name the recipient is addressed. */
  name: string;
  paragraphs: string[];
  /** The one thing to follow. */
  action: { label: string; path: string };
  /** The kind of notice it is, which its reader can turn off by one click. */
  kind?: NoticeKind;
}
