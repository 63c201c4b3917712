import { noticeKinds } from '@/api/notices.ts';
import type { WaitingLetter } from '../repositories/outbox.ts';
import type { Letter } from './letter.ts';
import { mailOffPath } from './mail-off-link.ts';
import { linkTo, siteOrigin } from './site-address.ts';

export interface Rendered {
  subject: string;
  text: string;
  html: string;
  messageId: string;
  headers: Record<string, string>;
}

/** A letter as it is sent. The Message-ID comes from its id: should a crash make it leave twice, a mail program shows
 *  it once. */
export function renderLetter({ id, userId, letter }: WaitingLetter): Rendered {
  const off = userId && letter.kind ? { link: linkTo(mailOffPath(userId, letter.kind)), kind: letter.kind } : undefined;
  return {
    subject: letter.subject,
    text: textOf(letter, off),
    html: htmlOf(letter, off),
    messageId: `<${id}@${new URL(siteOrigin()).hostname}>`,
    headers: {
      'Auto-Submitted': 'auto-generated',
      // RFC 8058: mail programs offer it as a button of their own.
      ...(off && { 'List-Unsubscribe': `<${off.link}>`, 'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click' }),
    },
  };
}

interface Off {
  link: string;
  kind: keyof typeof noticeKinds;
}

const whyText = (kind: Off['kind']): string => `You get this because of your choice “${noticeKinds[kind]}”.`;

function textOf(letter: Letter, off: Off | undefined): string {
  const parts = [
    `${letter.name},`,
    ...letter.paragraphs,
    `${letter.action.label}:\n${linkTo(letter.action.path)}`,
    ...(off ? [`--\n${whyText(off.kind)}\nTurn mail of this kind off:\n${off.link}`] : []),
  ];
  return `${parts.join('\n\n')}\n`;
}

/** Plain markup with styles on the elements, the only ones that mail programs agree on. */
function htmlOf(letter: Letter, off: Off | undefined): string {
  const paragraph = (inner: string) => `<p style="margin:0 0 16px">${inner}</p>`;
  const link = (href: string, label: string, style: string) =>
    `<a href="${escapeHtml(href)}" style="${style}">${escapeHtml(label)}</a>`;
  const body = [
    paragraph(`${escapeHtml(letter.name)},`),
    ...letter.paragraphs.map((text) => paragraph(escapeHtml(text))),
    paragraph(
      link(
        linkTo(letter.action.path),
        letter.action.label,
        'display:inline-block;padding:8px 16px;border:1px solid #b23a22;background:#b23a22;color:#fffdf7;text-decoration:none',
      ),
    ),
  ];
  const foot = off
    ? `<p style="margin:24px 0 0;padding-top:12px;border-top:1px solid #d8d1c0;font-size:13px;color:#56626b">${escapeHtml(
        whyText(off.kind),
      )} ${link(off.link, 'Turn mail of this kind off', 'color:#b23a22')}</p>`
    : '';
  return (
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(letter.subject)}</title></head>` +
    '<body style="margin:0;padding:24px;background:#f5f1e8;color:#1d2b34;font-family:sans-serif;font-size:15px;line-height:1.5">' +
    '<div style="max-width:560px;padding:24px;background:#fffdf7;border:1px solid #d8d1c0">' +
    `${body.join('')}${foot}</div></body></html>`
  );
}

const escapes: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (c) => escapes[c]!);
