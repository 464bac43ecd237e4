// The mail stand-in as one thing to start and stop: a mail server, and a page that shows what it took.
import { mkdtempSync, rmSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { openLetterStore, type KeptLetter } from './letter-store.ts';
import { holdMode, type ModeInput } from './modes.ts';
import { createPages } from './pages.ts';
import { createReceiver, hangUp } from './receiver.ts';

const LOOPBACK = '127.0.0.1';
/** Until the other side has noticed. */
const SETTLE_MS = 100;

export type SmtpStandIn = {
  smtpUrl: string;
  pageUrl: string;
  /** Newest first. */
  messages(): KeptLetter[];
  read(id: string): Promise<{ plain: string; html: string; source: string }>;
  setMode(mode: ModeInput): void;
  clear(): void;
  /** Cuts every line that stands open, as a server does with idle ones. */
  hangUp(): Promise<void>;
  stop(): Promise<void>;
};

export type SmtpInput = {
  /** 0 takes any free port. */
  port: number;
  pagePort: number;
  /** Kept from one start to the next; without it letters are forgotten at the stop. */
  stateFolder?: string;
};

const portOf = (address: AddressInfo | string | null): number =>
  typeof address === 'object' && address ? address.port : 0;

export async function startSmtp({ port, pagePort, stateFolder }: SmtpInput): Promise<SmtpStandIn> {
  const folder = stateFolder ?? mkdtempSync(join(tmpdir(), 'mail-'));
  const store = openLetterStore(folder);
  const modes = holdMode();
  const receiver = createReceiver(store, modes);
  await new Promise<void>((resolve, reject) => {
    receiver.once('error', reject);
    receiver.listen(port, LOOPBACK, resolve);
  });
  const pages = createPages(store, modes).listen(pagePort, LOOPBACK);
  await new Promise<void>((resolve, reject) => pages.once('listening', resolve).once('error', reject));
  return {
    smtpUrl: `smtp://${LOOPBACK}:${portOf(receiver.server.address())}`,
    pageUrl: `http://${LOOPBACK}:${portOf(pages.address())}`,
    messages: () => store.list(),
    async read(id) {
      const source = await store.readSource(id);
      const letter = await simpleParser(source);
      return { plain: letter.text ?? '', html: letter.html || '', source: source.toString('utf8') };
    },
    setMode: (mode) => void modes.set(mode),
    clear: () => store.clear(),
    async hangUp() {
      hangUp(receiver);
      await new Promise((resolve) => setTimeout(resolve, SETTLE_MS));
    },
    async stop() {
      pages.closeAllConnections();
      await new Promise((resolve) => pages.close(resolve));
      await new Promise<void>((resolve) => receiver.close(() => resolve()));
      if (stateFolder === undefined) rmSync(folder, { recursive: true, force: true });
    },
  };
}
