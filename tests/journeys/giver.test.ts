// A giver gives: on a phone, with each fate of the card, with mistakes, without a script, and is thanked.
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  expectAccessible,
  expectAccessibleBoth,
  expectAccessibleNarrow,
  openStage,
  PHONE,
  WIDE,
  type Stage,
} from '#tests/support/browser.ts';
import { control, setUpTown } from '#tests/support/factories.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
  await setUpTown(stage.app);
});
afterAll(() => stage.stop());

const lettersTo = (address: string) =>
  stage.mail.messages().filter((one) => JSON.stringify(one).includes(address));

async function fillSheet(page: Page, email: string): Promise<void> {
  await page.getByLabel('Full name').fill('Thea Quillan');
  await page.getByLabel('How should we greet you?').fill('Mrs Quillan');
  await page.getByLabel('E-mail', { exact: true }).fill(email);
}

async function toCardPage(page: Page, email: string): Promise<void> {
  await page.goto('/give');
  await fillSheet(page, email);
  await page.getByRole('button', { name: 'Check before you pay' }).click();
  await page.waitForURL('**/give/check');
  await page.getByRole('button', { name: 'Pay £20' }).click();
  await page.waitForURL('**/pay/**');
}

async function payWith(page: Page, card: RegExp): Promise<void> {
  await page.getByLabel(card).check();
  await page.getByRole('button', { name: /^Pay £/ }).click();
}

describe('with a phone', () => {
  test('£20 with a declaration, in memory, thanked and receipted', async () => {
    const { page, complaints } = await stage.visitor(PHONE);
    await page.goto('/', { waitUntil: 'networkidle' });
    await page.getByRole('button', { name: 'Give' }).click();
    await page.waitForURL('**/give**');
    await page.getByLabel('In memory of').check();
    await page.getByLabel('Their name').fill('Walter Quillan');
    await fillSheet(page, 'thea.quillan@post.example');
    await page.getByLabel(/^Address/).fill('9 Ropewalk');
    await page.getByLabel(/^Town/).fill('Brackenhythe');
    await page.getByLabel(/^Postcode/).fill('bk47hy');
    await page.getByLabel(/Treat as Gift Aid donations/).check();
    await page.getByRole('button', { name: 'Check before you pay' }).click();
    await page.waitForURL('**/give/check');
    await page.getByText('£25').first().waitFor();
    await expectAccessibleBoth(page);
    await page.getByRole('button', { name: 'Pay £20' }).click();
    await page.waitForURL('**/pay/**');
    await expectAccessibleBoth(page);
    await payWith(page, /Pays at once/);
    await page.waitForURL('**/give/done**');
    await page.getByText(/has come safely/).waitFor();
    await expectAccessibleBoth(page);
    await page.getByRole('link', { name: /Receipt 0/ }).click();
    await page.waitForURL('**/receipts/**');
    await page.getByText('Walter Quillan').first().waitFor();
    await expectAccessibleBoth(page);
    await expect.poll(() => lettersTo('thea.quillan@post.example'), { timeout: 20_000 }).toHaveLength(1);
    expect(complaints).toEqual([]);
    await expectBooksToAgree(stage.app.deps.db);
  });

  test('a refused card says so, and a second one pays', async () => {
    const { page } = await stage.visitor(PHONE);
    await toCardPage(page, 'refused.once@post.example');
    await payWith(page, /too little money/);
    await page.getByText(/there is too little money in the account/).waitFor();
    await expectAccessibleBoth(page);
    // Looking at the site meanwhile: it tells the truth, and leads back.
    const { rows } = await stage.app.deps.db.raw<{ rows: { id: string }[] }>(
      `select id from gift_intents order by created_at desc limit 1`,
    );
    const other = await page.context().newPage();
    await other.goto(`/give/done?gift=${rows[0]?.id}`);
    await other.getByText(/Nothing was taken/).waitFor();
    await expectAccessibleBoth(other);
    await other.close();
    await page.getByText(/there is too little money in the account/).waitFor();
    await payWith(page, /Pays at once/);
    await page.getByText(/has come safely/).waitFor();
  });

  test('a card that asks: left, then confirmed', async () => {
    const { page } = await stage.visitor(PHONE);
    await toCardPage(page, 'asked@post.example');
    await payWith(page, /Asks you to confirm/);
    await page.getByRole('button', { name: 'Leave it' }).click();
    await page.getByText(/You did not confirm that it is you/).waitFor();
    await payWith(page, /Asks you to confirm/);
    await page.getByRole('button', { name: 'Yes, it is me' }).click();
    await page.getByText(/has come safely/).waitFor();
  });

  test('a slow confirmation is told truly, and turns into thanks by itself', async () => {
    const { page } = await stage.visitor(PHONE);
    await control(stage.app, '/async/delay', { delayMs: 600_000 });
    await toCardPage(page, 'slow@post.example');
    await payWith(page, /confirmed some seconds later/);
    await page.getByText(/What happens next/).waitFor();
    await expectAccessibleBoth(page);
    await control(stage.app, '/async/confirm');
    await page.getByText(/has come safely/).waitFor({ timeout: 20_000 });
  });

  test('going back from the card page loses nothing', async () => {
    const { page } = await stage.visitor(PHONE);
    await toCardPage(page, 'went.back@post.example');
    await page.getByRole('link', { name: 'Go back' }).click();
    await page.waitForURL('**/give/check**');
    await page.getByText('went.back@post.example').waitFor();
    await page.getByRole('link', { name: /Change.*e-mail/i }).click();
    await page.waitForURL('**/give#email');
    expect(await page.getByLabel('Full name').inputValue()).toBe('Thea Quillan');
  });
});

describe('with mistakes', () => {
  test('every wrong field is named in a summary that takes the focus; every answer is kept', async () => {
    const { page, complaints } = await stage.visitor(WIDE);
    await page.goto('/give', { waitUntil: 'networkidle' });
    await expectAccessible(page);
    await expectAccessibleNarrow(page);
    await page.getByLabel('Full name').fill('Thea Quillan');
    await page.getByLabel('E-mail', { exact: true }).fill('thea.quillan.post.example');
    await page.getByLabel(/Treat as Gift Aid donations/).check();
    const kept = page.waitForResponse(/\/api\/gifts\/draft\?quiet=1/);
    await page.getByRole('button', { name: 'Check before you pay' }).click();
    await kept;
    const summary = page.getByRole('alert').first();
    await summary.getByRole('link', { name: /no @/ }).waitFor();
    expect(await page.evaluate(() => document.activeElement?.closest('[role=alert]') !== null)).toBe(true);
    expect(await page.title()).toMatch(/put(ting)? right/i);
    await expectAccessibleNarrow(page);
    await summary.getByRole('link', { name: /no @/ }).click();
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('email');
    await page.reload({ waitUntil: 'networkidle' });
    expect(await page.getByLabel('Full name').inputValue()).toBe('Thea Quillan');
    expect(complaints).toEqual([]);
  });

  test('a lost connection keeps the sheet and says that nothing was taken', async () => {
    const { page, context } = await stage.visitor(WIDE);
    await page.goto('/give', { waitUntil: 'networkidle' });
    await fillSheet(page, 'lost.connection@post.example');
    await context.setOffline(true);
    await page.getByRole('button', { name: 'Check before you pay' }).click();
    await page
      .getByText(/connection is lost/i)
      .first()
      .waitFor();
    expect(await page.getByLabel('Full name').inputValue()).toBe('Thea Quillan');
    await context.setOffline(false);
    await page
      .getByRole('button', { name: /again|Check before/i })
      .first()
      .click();
    await page.waitForURL('**/give/check');
  });
});

describe('without a script, by keyboard', () => {
  test('mistakes first, then the whole way to the thanks', async () => {
    const { page } = await stage.visitor({ viewport: { width: 320, height: 700 }, javaScriptEnabled: false });
    await page.goto('/give?amount=60');
    await page.getByLabel('Full name').focus();
    await page.keyboard.type('Zoë Łukasik');
    await page.keyboard.press('Enter');
    await page
      .getByRole('link', { name: /E-mail/ })
      .first()
      .waitFor();
    expect(await page.title()).toMatch(/put(ting)? right/i);
    expect(await page.getByLabel('Full name').inputValue()).toBe('Zoë Łukasik');
    await page.getByLabel('E-mail', { exact: true }).focus();
    await page.keyboard.type('zoe@post.example');
    await page.keyboard.press('Enter');
    await page.waitForURL('**/give/check');
    await page.getByRole('button', { name: 'Pay £60' }).focus();
    await page.keyboard.press('Enter');
    await page.waitForURL('**/pay/**');
    await page.getByRole('button', { name: /^Pay £/ }).focus();
    await page.keyboard.press('Enter');
    await page.waitForURL('**/give/done**');
    await page.getByText(/has come safely/).waitFor();
    await expect.poll(() => lettersTo('zoe@post.example'), { timeout: 20_000 }).toHaveLength(1);
  });
});
