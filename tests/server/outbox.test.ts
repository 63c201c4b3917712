import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { type Context, nowText } from '@/server/context.ts';
import { inTransaction } from '@/server/db/database.ts';
import { newId } from '@/server/ids.ts';
import { MailWorker } from '@/server/mail/mail-worker.ts';
import { mostAttempts, waitAfterMs } from '@/server/mail/retry.ts';
import { sendBySmtp } from '@/server/mail/smtp.ts';
import { unreadCount } from '@/server/repositories/notices.ts';
import { insertLetter } from '@/server/repositories/outbox.ts';
import { discardDeadLetter, listDeadLetters, retryDeadLetter } from '@/server/use-cases/notices/dead-letters.ts';
import { chooseNotices, noticeChoices } from '@/server/use-cases/notices/notice-choices.ts';
import { tell } from '@/server/use-cases/notices/tell.ts';
import { startMailServer, until } from './mail-server.ts';
import { furnishedScratch } from './scratch-database.ts';

let mail: Awaited<ReturnType<typeof startMailServer>>;
let context: Context;
let db: Context['db'];
beforeAll(async () => {
  process.env.AUTH_SECRET = 's'.repeat(40);
  process.env.LOCAL_URL = 'http://127.0.0.1:7777';
  mail = await startMailServer();
});
afterAll(() => mail.stop());
beforeEach(async () => {
  ({ context } = await furnishedScratch());
  ({ db } = context);
  mail.received.length = 0;
  for (const key of ['recipient', 'data'] as const) delete mail.refusals[key];
});

const news = {
  kind: 'run-finished' as const,
  projectId: null,
  title: 'Run “<b>&x” is finished',
  text: '3 of 3 points done.',
  path: '/projects/1/runs/2',
  label: 'Open the run',
};
const tellMe = () => inTransaction(db, (trx) => tell(trx, context.caller, news));
const letters = () => db('outbox').orderBy('id');
const worker = (waitMs = (attempts: number) => attempts * 20) => new MailWorker(db, sendBySmtp(mail.url), waitMs);

describe('telling somebody', () => {
  it('writes notice and letter in the transaction of the cause, and neither when it fails', async () => {
    const failing = inTransaction(db, async (trx) => {
      await tell(trx, context.caller, news);
      throw new Error('the cause failed');
    });
    await expect(failing).rejects.toThrow('the cause failed');
    expect([await unreadCount(db, context.caller.id), (await letters()).length]).toEqual([0, 0]);
    await tellMe();
    expect([await unreadCount(db, context.caller.id), (await letters()).length]).toEqual([1, 1]);
  });

  it('writes no letter to who turned that kind off, and still the notice', async () => {
    await chooseNotices(context, { choices: [{ kind: 'run-finished', byMail: false }] });
    expect((await noticeChoices(context)).choices).toContainEqual({ kind: 'run-finished', byMail: false });
    expect((await noticeChoices(context)).choices).toContainEqual({ kind: 'run-failed', byMail: true });
    await tellMe();
    expect([await unreadCount(db, context.caller.id), (await letters()).length]).toEqual([1, 0]);
  });

  it('writes no letter in production without a mail server', async () => {
    process.env.PUBLIC_URL = 'https://bench.example.test';
    try {
      await tellMe();
      expect((await noticeChoices(context)).mail).toBe('off');
    } finally {
      delete process.env.PUBLIC_URL;
    }
    expect([await unreadCount(db, context.caller.id), (await letters()).length]).toEqual([1, 0]);
  });
});

describe('a letter', () => {
  it('is text and HTML, with the link, and one click to turn its kind off', async () => {
    await tellMe();
    const sender = worker();
    sender.wake();
    const [letter] = await until('a letter', () => mail.received.length > 0 && mail.received);
    await until('marked as sent', async () => (await letters())[0].state === 'sent');
    await sender.stop();
    expect(letter!.subject).toBe(news.title);
    expect(letter!.text).toContain('A member,\n');
    expect(letter!.text).toContain('http://127.0.0.1:7777/projects/1/runs/2');
    expect(letter!.html).toContain('href="http://127.0.0.1:7777/projects/1/runs/2"');
    expect(letter!.html).toContain('Run “&lt;b&gt;&amp;x” is finished');
    const off = /http:\/\/127\.0\.0\.1:7777\/account\/mail-off\?\S+/.exec(letter!.text!)![0];
    expect(letter!.headerLines.find(({ key }) => key === 'list-unsubscribe')?.line.replace(/\s+/g, '')).toContain(off);
    const oneClick = letter!.headerLines.find(({ key }) => key === 'list-unsubscribe-post');
    expect(oneClick?.line).toBe('List-Unsubscribe-Post: List-Unsubscribe=One-Click');
    expect(letter!.messageId).toBe(`<${(await letters())[0].id}@127.0.0.1>`);
  });

  it('is tried again, ever later, while the mail server puts it off, and is sent when it takes it', async () => {
    mail.refusals.data = 451;
    await tellMe();
    const waits: number[] = [];
    const sender = worker((attempts) => {
      waits.push(attempts);
      return 10;
    });
    sender.wake();
    await until('three tries', () => waits.length >= 3);
    expect((await letters())[0]).toMatchObject({ state: 'waiting' });
    expect((await letters())[0].last_error).toContain('451');
    delete mail.refusals.data;
    await until('a letter', () => mail.received.length === 1);
    await until('marked as sent', async () => (await letters())[0].state === 'sent');
    await sender.stop();
    expect(waits.slice(0, 3)).toEqual([1, 2, 3]);
    expect([1, 2, 3, mostAttempts - 1].map((n) => waitAfterMs(n) / 1000)).toEqual([30, 60, 120, 30 * 2 ** 10]);
  });

  it('is given up at once when the mail server refuses its recipient for good', async () => {
    mail.refusals.recipient = 550;
    await tellMe();
    const sender = worker();
    sender.wake();
    await until('a dead letter', async () => (await letters())[0].state === 'dead');
    await sender.stop();
    expect((await letters())[0]).toMatchObject({ attempts: 1 });
  });

  it('is given up after twelve tries, listed with the last refusal, and can be tried anew or dropped', async () => {
    mail.refusals.data = 421;
    await tellMe();
    const sender = worker(() => 1);
    sender.wake();
    await until('a dead letter', async () => (await letters())[0].state === 'dead');
    await sender.stop();
    const administrator: Context = { db, caller: { ...context.caller, role: 'administrator' } };
    await expect(listDeadLetters(context, {})).rejects.toThrow('administrator');
    const { letters: dead } = await listDeadLetters(administrator, {});
    expect(dead).toMatchObject([{ attempts: mostAttempts, recipient: 'a@b.test', subject: news.title }]);
    expect(dead[0]!.lastError).toContain('421');

    delete mail.refusals.data;
    await expect(retryDeadLetter(context, dead[0]!.id)).rejects.toThrow('administrator');
    await retryDeadLetter(administrator, dead[0]!.id);
    const again = worker();
    again.wake();
    await until('the letter after all', () => mail.received.length === 1);
    await again.stop();
    await expect(discardDeadLetter(administrator, dead[0]!.id)).rejects.toThrow('no such undeliverable letter');
  });

  it('is sent once although two servers work on one database', async () => {
    for (let i = 0; i < 10; i++) await tellMe();
    const pair = [worker(), worker()];
    for (const sender of pair) sender.wake();
    await until('all sent', async () => (await letters()).every((row: { state: string }) => row.state === 'sent'));
    for (const sender of pair) await sender.stop();
    expect(mail.received.length).toBe(10);
    expect(new Set(mail.received.map(({ messageId }) => messageId)).size).toBe(10);
  });

  it('taken by the mail server while the process died is sent again under the same Message-ID', async () => {
    await tellMe();
    let die = () => {};
    const dying = new MailWorker(
      db,
      async (to, letter) => {
        await sendBySmtp(mail.url)(to, letter);
        // Never comes back, as after SIGKILL.
        await new Promise<void>((done) => {
          die = done;
        });
      },
      waitAfterMs,
      50,
    );
    dying.wake();
    await until('the first copy', () => mail.received.length === 1);
    const next = worker();
    next.wake();
    await until('the second copy', () => mail.received.length === 2);
    await next.stop();
    expect(mail.received[0]!.messageId).toBe(mail.received[1]!.messageId);
    die();
    await dying.stop();
  });

  it('of no kind, such as an invitation, offers nothing to turn off', async () => {
    const letter = { subject: 'x', name: 'y', paragraphs: ['z'], action: { label: 'Go', path: '/' } };
    await insertLetter(db, { id: newId(), userId: null, recipient: 'c@d.test', letter, at: nowText() });
    const sender = worker();
    sender.wake();
    await until('the letter', () => mail.received.length === 1);
    await sender.stop();
    expect(mail.received[0]!.text).not.toContain('off');
    expect(mail.received[0]!.headerLines.some(({ key }) => key === 'list-unsubscribe')).toBe(false);
  });
});
