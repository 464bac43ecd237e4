// The only file that names the tables of accounts and their recovery codes.
import { z } from 'zod';
import { roleSchema, type Role } from '#shared/roles.ts';
import { toCount, type Db, type Trx } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';

const COLUMNS = [
  'id',
  'name',
  'email',
  'password_hash',
  'roles',
  'is_trustee',
  'totp_secret',
  'totp_confirmed_at',
  'totp_last_step',
  'switched_off_at',
];
const accountRow = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  password_hash: z.string(),
  roles: z.array(roleSchema),
  is_trustee: z.boolean(),
  totp_secret: z.string().nullable(),
  totp_confirmed_at: z.date().nullable(),
  totp_last_step: z.coerce.number().nullable(),
  switched_off_at: z.date().nullable(),
});

export type AccountRecord = {
  id: string;
  name: string;
  email: string;
  passwordHash: string;
  roles: readonly Role[];
  isTrustee: boolean;
  isSwitchedOff: boolean;
  /** Once confirmed; the secret is sealed. */
  secondFactor: { sealedSecret: string; since: Date } | undefined;
};

function toAccount(found: unknown): AccountRecord | undefined {
  if (found === undefined) return undefined;
  const row = accountRow.parse(found);
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    passwordHash: row.password_hash,
    roles: row.roles,
    isTrustee: row.is_trustee,
    isSwitchedOff: row.switched_off_at !== null,
    secondFactor:
      row.totp_secret && row.totp_confirmed_at
        ? { sealedSecret: row.totp_secret, since: row.totp_confirmed_at }
        : undefined,
  };
}

export const findAccount = async (db: Db, id: string): Promise<AccountRecord | undefined> =>
  toAccount(await db('accounts').select(COLUMNS).where({ id }).first());

export async function getAccount(db: Db, id: string): Promise<AccountRecord> {
  const found = await findAccount(db, id);
  if (!found) throw new NotFound();
  return found;
}

export const findAccountByEmail = async (db: Db, email: string): Promise<AccountRecord | undefined> =>
  toAccount(
    await db('accounts').select(COLUMNS).whereRaw('lower(email) = ?', [email.trim().toLowerCase()]).first(),
  );

export type NewAccountRow = {
  name: string;
  email: string;
  passwordHash: string;
  roles: readonly Role[];
  isTrustee: boolean;
  isDemonstration: boolean;
  sealedSecret: string | null;
  createdAt: Date;
};

export async function insertAccount(trx: Trx, row: NewAccountRow): Promise<string> {
  const [written] = await trx('accounts')
    .insert({
      name: row.name,
      email: row.email,
      password_hash: row.passwordHash,
      roles: [...row.roles],
      is_trustee: row.isTrustee,
      is_demonstration: row.isDemonstration,
      totp_secret: row.sealedSecret,
      totp_confirmed_at: row.sealedSecret === null ? null : row.createdAt,
      created_at: row.createdAt,
    })
    .returning<{ id: string }[]>('id');
  return z.object({ id: z.string() }).parse(written).id;
}

export async function updatePassword(trx: Trx, id: string, passwordHash: string): Promise<void> {
  await trx('accounts').where({ id }).update({ password_hash: passwordHash });
}

export async function updateSecondFactor(
  trx: Trx,
  id: string,
  factor: { sealedSecret: string; step: number; at: Date },
): Promise<void> {
  await trx('accounts')
    .where({ id })
    .update({ totp_secret: factor.sealedSecret, totp_confirmed_at: factor.at, totp_last_step: factor.step });
}

/** Takes the time step once: two requests with one code cannot both have it. */
export async function takeTimeStep(trx: Trx, id: string, step: number): Promise<boolean> {
  const taken = await trx('accounts')
    .where({ id })
    .whereRaw('coalesce(totp_last_step, -1) < ?', [step])
    .update({ totp_last_step: step });
  return taken === 1;
}

export async function replaceRecoveryCodes(trx: Trx, accountId: string, hashes: string[]): Promise<void> {
  await trx('recovery_codes').where({ account_id: accountId }).delete();
  await trx('recovery_codes').insert(hashes.map((hash) => ({ account_id: accountId, code_hash: hash })));
}

export async function takeRecoveryCode(
  trx: Trx,
  accountId: string,
  hash: string,
  at: Date,
): Promise<boolean> {
  const taken = await trx('recovery_codes')
    .where({ account_id: accountId, code_hash: hash, used_at: null })
    .update({ used_at: at });
  return taken === 1;
}

export async function countRecoveryCodes(db: Db, accountId: string): Promise<number> {
  const found: unknown = await db('recovery_codes')
    .where({ account_id: accountId, used_at: null })
    .count({ left: '*' })
    .first();
  return toCount(z.object({ left: z.unknown() }).parse(found).left);
}

export async function countDemonstrationAccounts(db: Db): Promise<number> {
  const found: unknown = await db('accounts')
    .where({ is_demonstration: true, switched_off_at: null })
    .count({ left: '*' })
    .first();
  return toCount(z.object({ left: z.unknown() }).parse(found).left);
}
