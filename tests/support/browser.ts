// A real browser on the whole product: built pages, worker, payment and mail stand-ins.
import AxeBuilder from '@axe-core/playwright';
import {
  chromium,
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from 'playwright-core';
import { expect } from 'vitest';
import { startSmtp } from '#fakes/smtp/start-smtp.ts';
import { startWorker } from '#server/run-worker.ts';
import { startTestApp, type TestApp } from './app.ts';

const CHROMIUM = '/usr/bin/chromium';
const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export type Stage = {
  app: TestApp;
  browser: Browser;
  mail: Awaited<ReturnType<typeof startSmtp>>;
  /** A visitor with a window of their own; whatever their console complains of is kept. */
  visitor(options?: BrowserContextOptions): Promise<Visitor>;
  stop(): Promise<void>;
};
export type Visitor = { context: BrowserContext; page: Page; complaints: string[] };

// The browser itself notes an answer that is no 200; the pages say so to people in words.
const NOT_A_COMPLAINT = /Failed to load resource: the server responded with a status of (40[0149]|422)/;

export async function openStage(): Promise<Stage> {
  const mail = await startSmtp({ port: 0, pagePort: 0 });
  const app = await startTestApp({ smtpUrl: mail.smtpUrl });
  const worker = await startWorker(app.deps);
  const browser = await chromium.launch({ executablePath: CHROMIUM, args: FLAGS });
  return {
    app,
    browser,
    mail,
    async visitor(options = {}) {
      const context = await browser.newContext({
        baseURL: app.url,
        locale: 'en-GB',
        reducedMotion: 'reduce',
        ...options,
      });
      const page = await context.newPage();
      const complaints: string[] = [];
      page.on('console', (message) => {
        if (message.type() === 'error' && !NOT_A_COMPLAINT.test(message.text()))
          complaints.push(message.text());
      });
      page.on('pageerror', (error) => complaints.push(String(error)));
      return { context, page, complaints };
    },
    async stop() {
      await browser.close();
      await worker.stop();
      await app.stop();
      await mail.stop();
    },
  };
}

export const PHONE: BrowserContextOptions = {
  viewport: { width: 390, height: 844 },
  hasTouch: true,
  isMobile: true,
};
export const WIDE: BrowserContextOptions = { viewport: { width: 1280, height: 900 }, colorScheme: 'light' };
export const NARROW_DARK: BrowserContextOptions = {
  viewport: { width: 320, height: 700 },
  colorScheme: 'dark',
};

/** WCAG 2.2 A and AA by axe-core, and no sideways scroll. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze();
  expect(
    violations.map(
      (one) => `${page.url()} ${one.id}: ${one.nodes.map((node) => node.target.join(' ')).join(', ')}`,
    ),
  ).toEqual([]);
  const overflow = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(overflow, `${page.url()} scrolls sideways`).toBeLessThanOrEqual(0);
}

/** At 1280 px in light and at 320 px in dark, then as it was before. */
export async function expectAccessibleBoth(page: Page): Promise<void> {
  const before = page.viewportSize();
  await page.setViewportSize({ width: 1280, height: 900 });
  await expectAccessible(page);
  if (before) await page.setViewportSize(before);
  await expectAccessibleNarrow(page);
}

/** The same page as somebody with a narrow, dark window sees it. */
export async function expectAccessibleNarrow(page: Page): Promise<void> {
  const before = page.viewportSize();
  await page.setViewportSize({ width: 320, height: 700 });
  await page.emulateMedia({ colorScheme: 'dark' });
  await expectAccessible(page);
  await page.emulateMedia({ colorScheme: 'light' });
  if (before) await page.setViewportSize(before);
}
