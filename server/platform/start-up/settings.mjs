// What the person asked for: reads the environment and the command line, and refuses what cannot be meant.
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { StartFault } from './faults.mjs';

export const PROJECT = fileURLToPath(new URL('../../..', import.meta.url)).replace(/\/$/, '');

function readPort(text) {
  if (text === undefined || text === '') return undefined;
  const port = /^\d{1,5}$/.test(text) ? Number(text) : 0;
  if (port >= 1 && port <= 65_535) return port;
  throw new StartFault(`PORT is "${text}". It must be a whole number from 1 to 65535.`);
}

function readDatabase({ DATABASE_URL: url, DATABASE_OWNER_URL: ownerUrl }) {
  if (url && ownerUrl) return { url, ownerUrl };
  if (!url && !ownerUrl) return undefined;
  const [given, missing, role] = url
    ? ['DATABASE_URL', 'DATABASE_OWNER_URL', 'the role that owns and migrates the database']
    : ['DATABASE_OWNER_URL', 'DATABASE_URL', 'the role the application works under'];
  throw new StartFault(
    `${given} is set but ${missing} is not. Set ${missing} too (${role}), or leave both out for a private database.`,
  );
}

export function readSettings(env, args, project = PROJECT) {
  const mode = env.TREENAIL_MODE || 'demonstration';
  if (mode !== 'demonstration' && mode !== 'live') {
    throw new StartFault(`TREENAIL_MODE is "${mode}". It must be "demonstration" or "live".`);
  }
  const isDev = args.includes('--dev');
  const unknown = args.find((arg) => arg !== '--dev');
  if (unknown) throw new StartFault(`"${unknown}" is not understood. The one option is --dev.`);
  if (isDev && mode === 'live') {
    throw new StartFault('Live reload is for the demonstration only. Use npm start with TREENAIL_MODE=live.');
  }
  return {
    project,
    mode,
    isDev,
    isDemonstration: mode === 'demonstration',
    data: resolve(env.TREENAIL_DATA || resolve(project, '.local')),
    askedPort: readPort(env.PORT),
    database: readDatabase(env),
    publicAddress: env.TREENAIL_PUBLIC_ADDRESS || undefined,
  };
}
