// The treasurer signs in with a second factor, finds a gift, and follows it to the entries in the books.
import { generate } from 'otplib';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { DEMONSTRATION_PEOPLE } from '#seeds/demonstration-people.ts';
import { createAccount } from '#server/accounts/index.ts';
import { givingTasks } from '#server/giving/index.ts';
import {
  expectAccessible,
  expectAccessibleNarrow,
  openStage,
  WIDE,
  type Stage,
} from '#tests/support/browser.ts';
import { control, giveGift, setUpTown, withDeclaration } from '#tests/support/factories.ts';

let stage: Stage;
let number: number;
beforeAll(async () => {
  stage = await openStage();
  await setUpTown(stage.app);
  ({ number } = await giveGift(stage.app, {
    ...withDeclaration,
    wall: 'wall',
    wallWords: 'Thea, for Walter',
  }));
  await control(stage.app, '/fees/settle');
  await control(stage.app, '/webhooks/flush');
  await givingTasks(stage.app.deps)['poll-payments']();
});
afterAll(() => stage.stop());

const personWith = (role: string) => {
  const person = DEMONSTRATION_PEOPLE.find((one) => one.roles.some((has) => has === role));
  if (!person) throw new Error(`nobody is ${role}`);
  return person;
};

test('from the door to the last line of the books', async () => {
  const edwin = personWith('treasurer');
  const { page, complaints } = await stage.visitor(WIDE);
  await page.goto('/desk/gifts', { waitUntil: 'networkidle' });
  await page.waitForURL('**/desk/sign-in**');
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  await page.getByLabel('E-mail address', { exact: true }).fill(edwin.email);
  await page.getByLabel('Password', { exact: true }).fill('not the password');
  await page.getByRole('button', { name: 'Open the desk' }).click();
  await page.getByRole('alert').first().waitFor();
  await expectAccessible(page);
  await page.getByLabel('Password', { exact: true }).fill(edwin.password);
  await page.getByRole('button', { name: 'Open the desk' }).click();
  await page.waitForURL('**/desk/second-factor**');
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  await page.getByLabel('One-time code').fill(await generate({ secret: edwin.totpSecret ?? '' }));
  await page.getByRole('button', { name: 'Go on' }).click();
  await page.waitForURL('**/desk/gifts');

  await page.getByText('Thea Quillan').first().waitFor();
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  await page.getByRole('link', { name: 'Thea Quillan' }).first().click();
  await page.waitForURL(`**/desk/gifts/${number}`);
  await page.getByRole('heading', { name: 'In the books' }).waitFor();
  for (const words of ['Card service, not yet available', 'Gifts by card', 'Card fees', 'The figure'])
    await page.getByText(words).first().waitFor();
  await expectAccessible(page);
  await expectAccessibleNarrow(page);

  await page.goto('/desk', { waitUntil: 'networkidle' });
  await page
    .getByText(/Thea, for Walter/)
    .first()
    .waitFor();
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  await page.goto('/desk/account', { waitUntil: 'networkidle' });
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  await page.getByRole('button', { name: /leave the desk/i }).click();
  await page.waitForURL((address) => !address.pathname.startsWith('/desk/account'));
  expect((await page.request.get('/api/desk/gifts')).status()).toBe(401);
  expect(complaints).toEqual([]);
});

test('the desk with nothing in it says what goes there', async () => {
  const nell = personWith('secretary');
  const { page } = await stage.visitor(WIDE);
  await page.goto('/desk/sign-in', { waitUntil: 'networkidle' });
  await page.getByLabel('E-mail address', { exact: true }).fill(nell.email);
  await page.getByLabel('Password', { exact: true }).fill(nell.password);
  await page.getByRole('button', { name: 'Open the desk' }).click();
  await page.waitForURL('**/desk');
  await page.goto('/desk/gifts?from=2001-01-01&to=2001-01-31', { waitUntil: 'networkidle' });
  await expectAccessibleNarrow(page);
  await page.goto('/desk/gifts/999999', { waitUntil: 'networkidle' });
  await expectAccessibleNarrow(page);
});

test('a new treasurer must set up a second factor before anything opens', async () => {
  const newcomer = {
    name: 'Isolde Wherry',
    email: 'isolde.wherry@brackenhythe.example',
    password: 'a-lamp-for-every-night',
  };
  await stage.app.deps.db.transaction((trx) =>
    createAccount(trx, { ...newcomer, roles: ['treasurer'], createdAt: new Date() }),
  );
  const { page } = await stage.visitor(WIDE);
  await page.goto('/desk/sign-in', { waitUntil: 'networkidle' });
  await page.getByLabel('E-mail address', { exact: true }).fill(newcomer.email);
  await page.getByLabel('Password', { exact: true }).fill(newcomer.password);
  await page.getByRole('button', { name: 'Open the desk' }).click();
  await page.waitForURL('**/desk/second-factor/set-up**');
  await page.getByRole('heading', { level: 1 }).waitFor();
  await expectAccessible(page);
  await expectAccessibleNarrow(page);
  expect((await page.request.get('/api/desk/gifts')).status()).toBe(403);
});
