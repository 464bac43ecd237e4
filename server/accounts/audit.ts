// Writes the audit trail: who did what to which thing, in the transaction of the deed itself.
import type { Trx } from '#server/platform/db.ts';

export type Actor =
  { kind: 'desk'; accountId: string } | { kind: 'giver'; supporterId: string | null } | { kind: 'system' };

export type AuditLine = {
  at: Date;
  actor: Actor;
  /** A verb and its thing, such as `gift-received` or `words-passed`. */
  action: string;
  objectKind: string;
  objectId: string;
  /** Ids and money only; never a name, an address or words. */
  detail?: Record<string, string | number | boolean | null>;
  requestId?: string;
  /** What changed of a person, kept apart so that a later erasure can clear it with a mark. */
  personal?: {
    personKind: 'supporter' | 'account';
    personId: string;
    field: string;
    before: string | null;
    after: string | null;
  }[];
};

const actorId = (actor: Actor): string | null =>
  actor.kind === 'desk' ? actor.accountId : actor.kind === 'giver' ? actor.supporterId : null;

export async function recordAudit(trx: Trx, line: AuditLine): Promise<void> {
  const [written] = await trx('audit.lines')
    .insert({
      at: line.at,
      actor_kind: line.actor.kind,
      actor_id: actorId(line.actor),
      action: line.action,
      object_kind: line.objectKind,
      object_id: line.objectId,
      detail: JSON.stringify(line.detail ?? {}),
      request_id: line.requestId ?? null,
    })
    .returning<{ id: string }[]>('id');
  if (!written || !line.personal?.length) return;
  await trx('personal_values').insert(
    line.personal.map((value) => ({
      audit_line_id: written.id,
      person_kind: value.personKind,
      person_id: value.personId,
      field: value.field,
      before_value: value.before,
      after_value: value.after,
    })),
  );
}
