// All state, in memory for speed and in the journal for safety.
import type { z } from 'zod';
import { openJournal, readJournal } from './journal.ts';
import type { Change } from './journal.ts';
import * as rows from './rows.ts';

export type Collection<T> = {
  put(id: string, row: T): void;
  remove(id: string): void;
  find(id: string): T | undefined;
  /** In the order in which they were made; a row that changes keeps its place. */
  list(): T[];
  entries(): [id: string, row: T][];
};
/** The row that a field of another row names; such a field holds an id here, though its type allows a whole object. */
export const findNamed = <T>(collection: Collection<T>, reference: unknown): T | undefined =>
  typeof reference === 'string' ? collection.find(reference) : undefined;

type Loadable = { load(id: string, row: unknown): void; changes(): Change[] };

function createCollection<T>(name: string, schema: z.ZodType<T>, record: (change: Change) => void) {
  const kept = new Map<string, T>();
  const collection: Collection<T> & Loadable = {
    put: (id, row) => {
      kept.set(id, row);
      record([name, id, row]);
    },
    remove: (id) => {
      if (kept.delete(id)) record([name, id, null]);
    },
    find: (id) => kept.get(id),
    list: () => [...kept.values()],
    entries: () => [...kept],
    load: (id, row) => void (row === null ? kept.delete(id) : kept.set(id, schema.parse(row))),
    changes: () => [...kept].map(([id, row]) => [name, id, row]),
  };
  return collection;
}

function createCollections(record: (change: Change) => void) {
  return {
    sessions: createCollection('sessions', rows.sessionRowSchema, record),
    intents: createCollection('intents', rows.intentSchema, record),
    charges: createCollection('charges', rows.chargeSchema, record),
    transactions: createCollection('transactions', rows.transactionSchema, record),
    events: createCollection('events', rows.eventSchema, record),
    deliveries: createCollection('deliveries', rows.deliverySchema, record),
    timers: createCollection('timers', rows.timerSchema, record),
    answers: createCollection('answers', rows.storedAnswerSchema, record),
    settings: createCollection('settings', rows.settingsSchema, record),
  };
}

export type Store = ReturnType<typeof createCollections> & {
  /** Everything put inside is one line of the journal: after a kill all of it is there, or none. */
  write<T>(work: () => T): T;
  stop(): void;
};

export function openStore(folder: string): Store {
  let unit: Change[] | undefined;
  const collections = createCollections((change) => {
    if (unit) unit.push(change);
    else journal.append([change]);
  });
  const byName = new Map<string, Loadable>(Object.entries(collections));
  for (const [name, id, row] of readJournal(folder)) byName.get(name)?.load(id, row);
  const journal = openJournal(
    folder,
    [...byName.values()].flatMap((one) => one.changes()),
  );

  function write<T>(work: () => T): T {
    if (unit) return work();
    const changes: Change[] = [];
    unit = changes;
    try {
      return work();
    } finally {
      unit = undefined;
      if (changes.length > 0) journal.append(changes);
    }
  }
  return { ...collections, write, stop: () => journal.stop() };
}
