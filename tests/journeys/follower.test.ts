// A follower looks how far she has got: with and without a script, by keyboard, and sees a gift arrive.
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import {
  expectAccessible,
  expectAccessibleNarrow,
  openStage,
  PHONE,
  WIDE,
  type Stage,
} from '#tests/support/browser.ts';
import { giveGift, setUpTown } from '#tests/support/factories.ts';

let stage: Stage;
beforeAll(async () => {
  stage = await openStage();
  await setUpTown(stage.app);
  await giveGift(stage.app, { amount: 'other', other: '700.00' });
});
afterAll(() => stage.stop());

describe('the figure', () => {
  test('stands beside the staff with its line, sentence, parts and stages', async () => {
    const { page, complaints } = await stage.visitor(WIDE);
    await page.goto('/', { waitUntil: 'networkidle' });
    await page.getByText('£700 given.').waitFor();
    expect(await page.getByRole('heading', { level: 1 }).textContent()).toBe('The Lampwoman');
    expect(await page.locator('#row-footing').textContent()).toContain('£5,700');
    await page.getByRole('heading', { name: 'When things happen' }).waitFor();
    await expectAccessible(page);
    await expectAccessibleNarrow(page);
    expect(complaints).toEqual([]);
  });

  test('opens a part by keyboard alone, and Escape closes it', async () => {
    const { page, complaints } = await stage.visitor(WIDE);
    await page.goto('/', { waitUntil: 'networkidle' });
    const footing = page.locator('.fig a').first();
    await footing.focus();
    await page.keyboard.press('Enter');
    await page.waitForURL('**/parts/footing');
    await page.getByRole('link', { name: /Give to it/ }).waitFor();
    await expectAccessible(page);
    await page.keyboard.press('Escape');
    await page.waitForURL((address) => address.pathname === '/');
    expect(complaints).toEqual([]);
  });

  test('is whole without a script, each part at its own address', async () => {
    const { page } = await stage.visitor({ ...PHONE, javaScriptEnabled: false });
    await page.goto('/parts/panes');
    expect(await page.title()).toContain('The 24 panes');
    await page.getByText('£700 given.').waitFor();
    await page
      .getByRole('link', { name: /Give to it/ })
      .first()
      .click();
    await page.waitForURL('**/give?towards=panes');
    expect(await page.getByLabel(/The 24 panes/).isChecked()).toBe(true);
  });

  test('is drawn once per change of the data: a gift shows at the next look', async () => {
    const { page } = await stage.visitor(WIDE);
    const first = await page.request.get('/');
    const again = await page.request.get('/', { headers: { 'If-None-Match': first.headers().etag ?? '' } });
    expect(again.status()).toBe(304);
    expect(first.headers()['cache-control']).toContain('must-revalidate');
    await giveGift(stage.app, { amount: '60', email: 'another.giver@post.example', name: 'Another Giver' });
    await expect
      .poll(async () => (await (await page.request.get('/')).text()).replaceAll('<!-- -->', ''), {
        timeout: 10_000,
      })
      .toContain('£760 given.');
  });
});

test('the society’s own pages and a page that is not there', async () => {
  const { page, complaints } = await stage.visitor(WIDE);
  for (const path of ['/promise', '/privacy', '/using-this-site', '/no-such-page']) {
    const answer = await page.goto(path, { waitUntil: 'networkidle' });
    expect(answer?.status()).toBe(path === '/no-such-page' ? 404 : 200);
    await expectAccessible(page);
    await expectAccessibleNarrow(page);
  }
  await page.goto('/promise');
  await page.getByText(/If we cannot raise enough to finish her/).waitFor();
  expect(complaints).toEqual([]);
});
