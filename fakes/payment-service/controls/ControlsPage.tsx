// The page on which a person sees and moves the stand-in: its clock, its payments, its events and how they are carried.
import type Stripe from 'stripe';
import { Sheet } from '../pages/Sheet.tsx';
import { formatMoment } from '../pages/words.ts';
import type { Delivery, WebhookMode } from '../state/rows.ts';
import { ClockForms } from './ClockForms.tsx';
import { CourierForms } from './CourierForms.tsx';
import { PaymentsTable } from './PaymentsTable.tsx';
import type { Payment, readTruth } from './truth.ts';

export type EventLine = { event: Stripe.EventBase; delivery: Delivery | null };

type Props = {
  now: Date;
  isMoved: boolean;
  payments: readonly Payment[];
  totals: ReturnType<typeof readTruth>['totals'];
  events: readonly EventLine[];
  webhookUrl: string | null;
  mode: WebhookMode;
};

const STATE_WORDS: Record<Delivery['state'], string> = {
  waiting: 'on its way',
  held: 'held back to change the order',
  delivered: 'taken',
  dropped: 'dropped',
};

function deliveryWords(delivery: Delivery | null): string {
  if (!delivery) return 'nobody to tell';
  const tries = delivery.attempts === 1 ? 'once' : `${delivery.attempts} times`;
  const tried = delivery.attempts > 0 ? `, tried ${tries}, last answer ${delivery.lastAnswer}` : '';
  return `${STATE_WORDS[delivery.state]}${tried}`;
}

function EventsTable({ events }: { events: readonly EventLine[] }) {
  return (
    <div className="sheet scroll" tabIndex={0} role="region" aria-label="Events, newest first">
      <table>
        <caption>Events, newest first</caption>
        <thead>
          <tr>
            <th scope="col">When</th>
            <th scope="col">What happened</th>
            <th scope="col">Delivery</th>
            <th scope="col">Id</th>
          </tr>
        </thead>
        <tbody>
          {events.map(({ event, delivery }) => (
            <tr key={event.id}>
              <td>{formatMoment(new Date(event.created * 1000))}</td>
              <td>{event.type}</td>
              <td>{deliveryWords(delivery)}</td>
              <td>{event.id}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {events.length === 0 && (
        <p className="ash">Nothing has happened yet. A payment makes the first events.</p>
      )}
    </div>
  );
}

export function ControlsPage({ now, isMoved, payments, totals, events, webhookUrl, mode }: Props) {
  return (
    <Sheet title="Payment stand-in: controls" isWide>
      <h1>Payment stand-in</h1>
      <div className="columns">
        <ClockForms now={now} isMoved={isMoved} />
        <CourierForms mode={mode} webhookUrl={webhookUrl} />
      </div>
      <PaymentsTable payments={payments} totals={totals} />
      <EventsTable events={events} />
    </Sheet>
  );
}
