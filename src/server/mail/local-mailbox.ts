import { mkdir, readdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { dataDir } from '../config.ts';
import { isId, newId } from '../ids.ts';

const mostKept = 500;
const sizeLimitBytes = 5 * 1024 * 1024;

/** A letter that came into the mailbox of local mode. */
export interface ReceivedMail {
  id: string;
  from: string;
  to: string;
  subject: string;
  receivedAt: string;
  text: string;
  html: string | null;
  /** Header lines as they came. */
  headers: string;
}

const folder = (): string => join(dataDir(), 'mailbox');

/** Starts a mail server on a free port of the loopback interface that takes everything and forwards nothing: each
 *  letter becomes a file in the data folder.
 *  @returns its SMTP address. */
export async function startLocalMailbox(): Promise<string> {
  await mkdir(folder(), { recursive: true, mode: 0o700 });
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    authOptional: true,
    size: sizeLimitBytes,
    onData(stream, _session, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (stream.sizeExceeded) done(new Error('The letter is too large.'));
        else keep(Buffer.concat(chunks)).then(() => done(), done);
      });
    },
  });
  server.on('error', (error) => console.error('The local mailbox:', error.message));
  return new Promise((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      // Does not keep the process from ending.
      server.server.unref();
      const { port } = server.server.address() as { port: number };
      resolve(`smtp://127.0.0.1:${port}?ignoreTLS=true`);
    });
  });
}

async function keep(raw: Buffer): Promise<void> {
  const file = join(folder(), `${newId()}.eml`);
  await writeFile(`${file}.partial`, raw, { mode: 0o600 });
  await rename(`${file}.partial`, file);
  for (const old of (await ids()).slice(mostKept)) await rm(join(folder(), `${old}.eml`), { force: true });
}

/** Ids of the letters kept, newest first. */
async function ids(): Promise<string[]> {
  const names = await readdir(folder()).catch(() => []);
  return names
    .filter((name) => name.endsWith('.eml'))
    .map((name) => name.slice(0, -4))
    .filter(isId)
    .sort()
    .reverse();
}

/** The newest letters, at most `limit`. */
export async function receivedMail(limit: number): Promise<ReceivedMail[]> {
  const found = await Promise.all((await ids()).slice(0, limit).map(receivedById));
  return found.filter((mail) => mail !== undefined);
}

export async function receivedById(id: string): Promise<ReceivedMail | undefined> {
  if (!isId(id)) return undefined;
  const raw = await readFile(join(folder(), `${id}.eml`)).catch(() => undefined);
  return raw && toReceived(id, await simpleParser(raw, { skipImageLinks: true }));
}

function toReceived(id: string, mail: ParsedMail): ReceivedMail {
  const address = (field: ParsedMail['to']) => [field ?? []].flat().map(({ text }) => text);
  return {
    id,
    from: mail.from?.text ?? '',
    to: address(mail.to).join(', '),
    subject: mail.subject ?? '',
    receivedAt: mail.date?.toISOString() ?? '',
    text: mail.text ?? '',
    html: mail.html || null,
    headers: mail.headerLines.map(({ line }) => line).join('\n'),
  };
}
