// Objects as they read at this moment: what follows from the clock or the port is worked out when asked.
import type Stripe from 'stripe';
import { nowSeconds } from '../state/clock.ts';
import type { Service } from '../service.ts';

export const presentSession = (
  service: Service,
  session: Stripe.Checkout.Session,
): Stripe.Checkout.Session => ({
  ...session,
  url: session.status === 'open' ? `${service.pageUrl()}/pay/${session.id}` : null,
});

export const presentIntent = (service: Service, id: string): Stripe.PaymentIntent | undefined => {
  const intent = service.store.intents.find(id);
  return intent?.next_action ? { ...intent, next_action: nextActionOf(service, intent.id) } : intent;
};

function nextActionOf(service: Service, intentId: string): Stripe.PaymentIntent.NextAction {
  const row = service.store.sessions.list().find(({ session }) => session.payment_intent === intentId);
  const url = row ? `${service.pageUrl()}/pay/${row.session.id}/confirm` : null;
  return { type: 'redirect_to_url', redirect_to_url: { return_url: row?.session.success_url ?? null, url } };
}

export const presentTransaction = (service: Service, id: string): Stripe.BalanceTransaction | undefined => {
  const transaction = service.store.transactions.find(id);
  return (
    transaction && { ...transaction, status: isAvailable(service, transaction) ? 'available' : 'pending' }
  );
};

export const isAvailable = (service: Service, transaction: Stripe.BalanceTransaction): boolean =>
  transaction.available_on <= nowSeconds(service);

export const presentEvent = (service: Service, event: Stripe.EventBase): Stripe.EventBase => {
  const delivery = service.store.deliveries.find(event.id);
  const isPending = delivery?.state === 'waiting' || delivery?.state === 'held';
  return { ...event, pending_webhooks: isPending ? 1 : 0 };
};
