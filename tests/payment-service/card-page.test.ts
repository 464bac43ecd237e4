// The card page as a browser without scripts uses it: forms, redirects, refusals, and what the page may do.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftOf, startStandIn } from './stand-in.ts';
import type { StandIn } from './stand-in.ts';

let standIn: StandIn;
beforeAll(async () => {
  standIn = await startStandIn();
});
afterAll(() => standIn.tearDown());

const GOOD = { card: '4242424242424242', number: '', expiry: '12 / 40', code: '123' };

async function openSession() {
  const session = await standIn.stripe.checkout.sessions.create(giftOf(2000));
  if (!session.url) throw new Error('the session has no page');
  return { id: session.id, url: session.url, thanks: `http://127.0.0.1:9/give/thanks?session=${session.id}` };
}

async function press(url: string, fields: Record<string, string>) {
  const response = await fetch(url, {
    method: 'POST',
    body: new URLSearchParams(fields),
    redirect: 'manual',
  });
  return { status: response.status, location: response.headers.get('location'), html: await response.text() };
}
const look = async (url: string): Promise<string> => (await fetch(url)).text();
const statusOf = async (id: string) => (await standIn.stripe.checkout.sessions.retrieve(id)).payment_status;

describe('the card page', () => {
  it('says what it is and what is paid, and offers the test cards', async () => {
    const { url } = await openSession();
    const html = await look(url);
    expect(html).toContain('A stand-in for the demonstration.');
    expect(html).toContain('£20.00');
    expect(html).toContain('4000 0000 0000 9995');
    expect(html).toContain('Go back without paying');
    expect(html).not.toMatch(/ style=|<script>|autocomplete="cc/i);
  });

  it('lets nothing run that is not its own, and a form lead only to the site that asked', async () => {
    const policy = (await fetch((await openSession()).url)).headers.get('content-security-policy');
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("form-action 'self' http://127.0.0.1:9");
    expect(policy).not.toContain('unsafe-inline');
  });

  it('leads back with the id of the session once the card is given, however often it is pressed', async () => {
    const { id, url, thanks } = await openSession();
    expect(await press(url, GOOD)).toMatchObject({ status: 303, location: thanks });
    expect(await press(url, GOOD)).toMatchObject({ status: 303, location: thanks });
    expect(await statusOf(id)).toBe('paid');
    const truth = await standIn.stripe.charges.list({ limit: 100 });
    expect(truth.data).toHaveLength(1);
    expect(await look(url)).toContain('This payment is done');
  });

  it('comes back with the reason when the card is refused, and takes another', async () => {
    const { url, thanks } = await openSession();
    const refused = await press(url, { ...GOOD, card: '4000000000009995' });
    expect(refused.status).toBe(303);
    const html = await look(new URL(refused.location ?? '', url).href);
    expect(html).toContain('there is too little money in the account');
    expect(html).toContain('<title>Error: ');
    expect(await press(url, GOOD)).toMatchObject({ location: thanks });
  });

  it('takes a number that was typed before one that was chosen, spaces and all', async () => {
    const { id, url } = await openSession();
    await press(url, { ...GOOD, number: '4000 0000 0000 0002' });
    expect(await statusOf(id)).toBe('unpaid');
  });

  it('names every field that is wrong, keeps the others, and never repeats a number', async () => {
    const { url } = await openSession();
    const wrong = await press(url, {
      card: '',
      number: '4929 1234 5678 9012',
      expiry: '01 / 20',
      code: '12',
    });
    expect(wrong.status).toBe(422);
    for (const id of ['number', 'expiry', 'code']) expect(wrong.html).toContain(`href="#${id}"`);
    expect(wrong.html).toContain('value="01 / 20"');
    expect(wrong.html).not.toContain('4929');
  });

  it('asks for confirmation on a second page, which can be given or left', async () => {
    const { id, url, thanks } = await openSession();
    const asked = await press(url, { ...GOOD, card: '4000002500003155' });
    expect(asked.location).toBe(`/pay/${id}/confirm`);
    const left = await press(`${url}/confirm`, { answer: 'leave' });
    expect(left.location).toBe(`/pay/${id}`);
    expect(await look(url)).toContain('You did not confirm that it is you');
    await press(url, { ...GOOD, card: '4000002500003155' });
    expect(await look(`${url}/confirm`)).toContain('Yes, it is me');
    expect(await press(`${url}/confirm`, { answer: 'confirm' })).toMatchObject({ location: thanks });
    expect(await statusOf(id)).toBe('paid');
  });

  it('says so when there is nothing to pay, or it is too late', async () => {
    expect((await fetch(`${standIn.apiUrl}/pay/cs_test_none`)).status).toBe(404);
    const { id, url } = await openSession();
    await standIn.stripe.checkout.sessions.expire(id);
    const late = await fetch(url);
    expect(late.status).toBe(410);
    expect(await late.text()).toContain('Nothing was taken');
  });
});

describe('the controls’ page', () => {
  const page = () => fetch(standIn.controlUrl);

  it('shows payments, events and the clock, and moves it by a form', async () => {
    const { url } = await openSession();
    await press(url, GOOD);
    expect(await (await page()).text()).toContain('checkout.session.completed');
    const moved = await press(`${standIn.controlUrl}/page/clock/to`, { to: '2027-02-03T10:00' });
    expect(moved).toMatchObject({ status: 303, location: '/' });
    expect(await (await page()).text()).toContain('3 Feb 2027');
    await press(`${standIn.controlUrl}/page/clock/reset`, {});
    await press(`${standIn.controlUrl}/page/mode`, {
      drop: '2',
      double: '0',
      reorder: '0',
      delaySeconds: '1',
    });
    const webhooks: unknown = await (await fetch(`${standIn.controlUrl}/webhooks`)).json();
    expect(webhooks).toMatchObject({ mode: { dropNext: 2, delayMs: 1000, paused: false } });
  });

  it('is not moved by a page of another site', async () => {
    const response = await fetch(`${standIn.controlUrl}/clock`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', 'sec-fetch-site': 'cross-site' },
      body: '{"advanceMs":1}',
    });
    expect(response.status).toBe(403);
  });

  it('refuses a command that it cannot read, in words', async () => {
    await expect(standIn.control('/clock', { to: 'tomorrow' })).rejects.toThrow('400');
    await expect(standIn.control('/sessions/cs_test_none/pay')).rejects.toThrow('409');
  });
});
