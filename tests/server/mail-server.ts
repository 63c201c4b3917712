import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** A mail server of a test's own, which can be told to refuse. */
export async function startMailServer() {
  const received: ParsedMail[] = [];
  const refusals: { recipient?: number; data?: number } = {};
  const refusal = (code: number) =>
    Object.assign(new Error(`refused by the test with ${code}`), { responseCode: code });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    onRcptTo: (_address, _session, done) => done(refusals.recipient ? refusal(refusals.recipient) : null),
    onData(stream, _session, done) {
      simpleParser(stream).then((mail) => {
        if (refusals.data) return done(refusal(refusals.data));
        received.push(mail);
        done();
      }, done);
    },
  });
  server.on('error', () => {});
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', () => resolve()));
  const { port } = server.server.address() as { port: number };
  return {
    url: `smtp://127.0.0.1:${port}?ignoreTLS=true`,
    received,
    refusals,
    stop: () => new Promise<void>((resolve) => server.close(() => resolve())),
  };
}

/** Waits until something holds, or says what did not. */
export async function until<T>(
  what: string,
  look: () => T | undefined | false | Promise<T | undefined | false>,
): Promise<T> {
  for (let from = Date.now(); Date.now() - from < 15_000; ) {
    const found = await look();
    if (found) return found;
    await new Promise((done) => setTimeout(done, 30));
  }
  throw new Error(`Never seen: ${what}`);
}
