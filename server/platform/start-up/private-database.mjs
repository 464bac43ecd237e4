// Brings up the private database of one data folder: found or installed, made, started, its roles in place.
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { databaseAccount, findBinaries, prepareFolder } from './cluster-folder.mjs';
import { APP, OWNER, databaseUrl, prepareSql, runSql } from './database.mjs';
import { StartFault } from './faults.mjs';
import { beginAgain, isHalfFilled } from './half-filled.mjs';
import { installDebian } from './install.mjs';
import { clearPidFile, makeCluster, serverSpec, untilReady } from './postgres.mjs';

const NAME = 'treenail';

const OTHERWISE = 'Or give a database of your own in DATABASE_URL and DATABASE_OWNER_URL.';

/** Finds PostgreSQL's programs, installing Debian's package where there are none. */
export async function needBinaries({ folder, run, say, env, otherwise = OTHERWISE }) {
  const found = findBinaries(folder);
  if (found) return found;
  say('installing PostgreSQL');
  await installDebian(['postgresql'], { purpose: 'PostgreSQL', otherwise, run, env });
  const installed = findBinaries(folder);
  if (!installed)
    throw new StartFault(`PostgreSQL was installed, but its programs are not found. ${OTHERWISE}`);
  return installed;
}

/** A cluster whose password is lost cannot be opened; making new secrets would only hide that. */
export function refuseLostPassword(data, secretsFile) {
  if (!existsSync(join(data, 'pg', 'PG_VERSION')) || existsSync(secretsFile)) return;
  throw new StartFault(
    `${data}/pg holds a database, but ${secretsFile} with its passwords is gone. ` +
      'Put that file back, or move the pg folder away to begin with an empty database.',
  );
}

export async function startPrivateDatabase({ data, port, secrets, crew, say, env }) {
  const wanted = join(data, 'pg');
  const bin = await needBinaries({ folder: wanted, run: crew.runToEnd, say, env });
  const account = databaseAccount();
  const folder = prepareFolder(wanted, account);
  clearPidFile(folder);
  const password = secrets.databaseSuperuser;
  const marker = join(data, 'pg-being-made');
  const isNew = await makeCluster({ bin, folder, account, password, run: crew.runToEnd, marker });
  crew.keep(serverSpec({ bin, folder, account, port }));
  await crew.whileAllLive(untilReady({ bin, port }));
  const connection = { bin, port, password };
  const roles = { name: NAME, ownerPassword: secrets.databaseOwner, appPassword: secrets.databaseApp };
  await runSql(connection, prepareSql(roles));
  return {
    isNew,
    isHalfFilled: () => isHalfFilled(connection, NAME),
    beginAgain: () => beginAgain(connection, roles),
    url: databaseUrl({ role: APP, password: secrets.databaseApp, port, name: NAME }),
    ownerUrl: databaseUrl({ role: OWNER, password: secrets.databaseOwner, port, name: NAME }),
  };
}
