// The payment service through its own SDK. Every answer is checked to be the object that was asked for.
import Stripe from 'stripe';
import type { Config } from './config.ts';
import { Upstream } from './errors.ts';

export type Payments = Stripe;

const TIMEOUT_MS = 10_000;

export function openPayments(config: Config): Payments {
  const common = { maxNetworkRetries: 2, telemetry: false, timeout: TIMEOUT_MS };
  if (!config.payment.apiUrl) return new Stripe(config.payment.key, common);
  const api = new URL(config.payment.apiUrl);
  return new Stripe(config.payment.key, {
    ...common,
    host: api.hostname,
    port: api.port,
    protocol: api.protocol === 'https:' ? 'https' : 'http',
  });
}

/** The SDK takes any JSON without an `error` for success, whatever its status; so each answer is looked at. */
export function checked<T extends { object: string; id: string }>(
  answer: T,
  object: T['object'],
  id?: string,
): T {
  if (answer.object !== object || typeof answer.id !== 'string' || (id !== undefined && answer.id !== id))
    throw new Upstream('The card service gave an answer that we could not read.');
  return answer;
}
