// The whole server with a small world and one person for each role, signed in.
import { ROLES, type Role } from '#shared/roles.ts';
import type { Db } from '#server/platform/db.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { signIn, type Present } from './desk-people.ts';
import { addWorld, type World } from './desk-rows.ts';

export type Desk = {
  app: TestApp;
  db: Db;
  world: World;
  /** “The treasurer”, “The chair” and so on. */
  as(role: Role): Present;
  auditOf(objectId: string): Promise<{ action: string; actor_id: string }[]>;
};

export async function openDesk(): Promise<Desk> {
  const app = await startTestApp();
  const { db } = app.deps;
  const world = await addWorld(db);
  const people = new Map<Role, Present>();
  for (const role of ROLES) people.set(role, await signIn(app, [role], `The ${role}`));
  return {
    app,
    db,
    world,
    as(role) {
      const person = people.get(role);
      if (!person) throw new Error(`nobody is ${role}`);
      return person;
    },
    auditOf: (objectId) =>
      db('audit.lines')
        .where({ object_id: objectId })
        .orderBy('id')
        .select<{ action: string; actor_id: string }[]>('action', 'actor_id'),
  };
}
