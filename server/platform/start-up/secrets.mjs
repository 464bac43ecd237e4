// The secrets that this machine made up for itself, kept in one file that only its owner can read.
import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { StartFault } from './faults.mjs';

const random = (bytes = 24) => randomBytes(bytes).toString('base64url');

const DATABASE = { databaseSuperuser: random, databaseOwner: random, databaseApp: random };
/** Marked as what they are, so that live mode can refuse one that was copied over. */
const DEMONSTRATION = {
  session: () => `demonstration-${random(48)}`,
  paymentKey: () => `sk_test_${randomBytes(24).toString('hex')}`,
  paymentWebhook: () => `whsec_demonstration_${randomBytes(24).toString('hex')}`,
};

function readSecrets(file) {
  if (!existsSync(file)) return {};
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    throw new StartFault(
      `${file} cannot be read. It holds the passwords of this data folder: put back a good copy.`,
    );
  }
}

/** Reads what is there and makes what is missing; live mode never makes secrets of payment, mail or sign-in. */
export function keepSecrets(file, { isDemonstration, withDatabase }) {
  const makers = { ...(withDatabase ? DATABASE : {}), ...(isDemonstration ? DEMONSTRATION : {}) };
  const known = readSecrets(file);
  const secrets = { ...known };
  for (const [name, make] of Object.entries(makers)) secrets[name] ??= make();
  if (Object.keys(secrets).length > Object.keys(known).length) {
    // Written whole and moved into place: half a file would lock the database for good.
    writeFileSync(`${file}.new`, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
    chmodSync(`${file}.new`, 0o600);
    renameSync(`${file}.new`, file);
  }
  return secrets;
}
