// Sends one signed copy of an event to the webhook and says how it was answered.
import { createHmac } from 'node:crypto';
import type Stripe from 'stripe';

const PATIENCE_MS = 10_000;
export type Posted = { isAccepted: boolean; answer: string };

/** The time is the real one, whatever the moved clock says: the receiver compares it with its own. */
function signatureOf(body: string, secret: string): string {
  const t = Math.floor(Date.now() / 1000);
  const mark = createHmac('sha256', secret).update(`${t}.${body}`).digest('hex');
  return `t=${t},v1=${mark}`;
}

export async function postEvent(
  event: Stripe.EventBase,
  webhook: { url: string; secret: string },
  stopping: AbortSignal,
): Promise<Posted> {
  const body = JSON.stringify(event, null, 2);
  try {
    const response = await fetch(webhook.url, {
      method: 'POST',
      body,
      redirect: 'manual',
      headers: {
        'content-type': 'application/json; charset=utf-8',
        'stripe-signature': signatureOf(body, webhook.secret),
        'user-agent': 'Stripe/1.0 (+https://stripe.com/docs/webhooks)',
      },
      signal: AbortSignal.any([stopping, AbortSignal.timeout(PATIENCE_MS)]),
    });
    await response.arrayBuffer();
    return { isAccepted: response.ok, answer: String(response.status) };
  } catch (error) {
    const timedOut = error instanceof Error && error.name === 'TimeoutError';
    return { isAccepted: false, answer: timedOut ? 'no answer' : 'not reached' };
  }
}
