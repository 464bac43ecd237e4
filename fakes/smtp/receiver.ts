// The mail server's side of the line: speaks SMTP, obeys the mode, hands what it took to the store.
import { Socket } from 'node:net';
import { simpleParser } from 'mailparser';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import { z } from 'zod';
import type { LetterStore } from './letter-store.ts';
import type { ModeHolder } from './modes.ts';

const MOST_BYTES = 10 * 1024 * 1024;
const CLOSE_TIMEOUT_MS = 200;

const refusal = (code: number, words: string): Error =>
  Object.assign(new Error(words), { responseCode: code });

const REFUSAL_WORDS: Record<number, string> = {
  550: 'No such mailbox here',
  452: 'Mailbox is full, try later',
  451: 'Not now, try later',
};
const refuse = (code: number): Error => refusal(code, REFUSAL_WORDS[code] ?? 'Refused');

async function readAll(stream: SMTPServerDataStream): Promise<Buffer> {
  const pieces: Buffer[] = [];
  for await (const piece of stream) pieces.push(z.instanceof(Buffer).parse(piece));
  return Buffer.concat(pieces);
}

async function keep(store: LetterStore, session: SMTPServerSession, source: Buffer): Promise<void> {
  const letter = await simpleParser(source);
  const toText = Array.isArray(letter.to) ? letter.to.map((one) => one.text).join(', ') : letter.to?.text;
  await store.keep(
    {
      receivedAt: new Date().toISOString(),
      envelopeFrom: session.envelope.mailFrom ? session.envelope.mailFrom.address : '',
      envelopeTo: session.envelope.rcptTo.map((one) => one.address),
      fromText: letter.from?.text ?? '',
      toText: toText ?? '',
      subject: letter.subject ?? '',
      messageId: letter.messageId ?? '',
      bytes: source.length,
    },
    source,
  );
}

/** smtp-server has no word for hanging up without an answer, so the line itself is cut. */
const lineSchema = z.object({ id: z.string(), _socket: z.instanceof(Socket) });

/** Cuts the line of one session, or every line. */
export function hangUp(server: SMTPServer, session?: SMTPServerSession): void {
  for (const connection of server.connections) {
    const line = lineSchema.parse(connection);
    if (session === undefined || line.id === session.id) line._socket.destroy();
  }
}

export function createReceiver(store: LetterStore, modes: ModeHolder): SMTPServer {
  async function take(
    stream: SMTPServerDataStream,
    session: SMTPServerSession,
  ): Promise<string | Error | undefined> {
    const source = await readAll(stream);
    const { delayMs, afterDataCode } = modes.get();
    const fate = modes.nextAfterData();
    if (delayMs > 0) await new Promise((resolve) => setTimeout(resolve, delayMs));
    if (stream.sizeExceeded) return refusal(552, 'The letter is too large');
    if (fate === 'answer') return refuse(afterDataCode);
    if (fate !== 'drop-lost') await keep(store, session, source);
    if (fate === 'take') return 'Kept';
    hangUp(server, session);
    return undefined;
  }
  const server: SMTPServer = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: MOST_BYTES,
    closeTimeout: CLOSE_TIMEOUT_MS,
    // A reverse lookup of loopback can take seconds on a machine without a network.
    disableReverseLookup: true,
    onRcptTo({ address }, _session, answer) {
      const code = modes.findRefusal(address);
      answer(code === undefined ? undefined : refuse(code));
    },
    onData(stream, session, answer) {
      take(stream, session).then(
        (taken) => {
          if (taken === undefined) return;
          if (typeof taken === 'string') answer(null, taken);
          else answer(taken);
        },
        () => answer(refusal(451, 'The stand-in could not keep the letter')),
      );
    },
  });
  // A sender that hangs up mid-way is no fault of the stand-in's.
  server.on('error', () => undefined);
  return server;
}
