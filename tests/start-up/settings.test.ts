// What may be asked of the start, and what each process is told.
import { mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { appEnvironment } from '#server/platform/start-up/environment.mjs';
import { choosePort, chooseSitePort, rememberPorts } from '#server/platform/start-up/ports.mjs';
import { keepSecrets } from '#server/platform/start-up/secrets.mjs';
import { readSettings } from '#server/platform/start-up/settings.mjs';

let folder = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'treenail-settings-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

describe('settings', () => {
  test('without any, the demonstration runs in the project’s own folder', () => {
    expect(readSettings({}, [], '/project')).toMatchObject({
      mode: 'demonstration',
      data: '/project/.local',
    });
  });

  test.each([
    [{ TREENAIL_MODE: 'production' }, [], /TREENAIL_MODE/],
    [{ PORT: '0' }, [], /PORT/],
    [{ PORT: '80 80' }, [], /PORT/],
    [{ DATABASE_URL: 'postgres://app@db/treenail' }, [], /DATABASE_OWNER_URL/],
    [{ DATABASE_OWNER_URL: 'postgres://owner@db/treenail' }, [], /DATABASE_URL is not/],
    [{ TREENAIL_MODE: 'live' }, ['--dev'], /demonstration only/],
    [{}, ['--fast'], /--fast/],
  ])('%j with %j is refused in words', (env, args, words) => {
    expect(() => readSettings(env, args, '/project')).toThrow(words);
  });
});

describe('ports', () => {
  const freeFrom = (first: number) => ({ isFree: (port: number) => Promise.resolve(port >= first) });

  test('the next free one is taken, and never the same twice', async () => {
    const taken = new Set<number>();
    const options = { taken, ...freeFrom(4175) };
    expect([await choosePort(4173, options), await choosePort(4173, options)]).toEqual([4175, 4176]);
  });

  test('a usual port that is taken moves the site; one that was asked for is refused', async () => {
    expect(await chooseSitePort(undefined, freeFrom(4180))).toEqual({ port: 4180, moved: true });
    await expect(chooseSitePort(4173, freeFrom(4180))).rejects.toThrow(/4173 is taken/);
  });

  test('stand-ins keep their ports from start to start while these are free', async () => {
    const file = join(folder, 'ports.json');
    const first = await rememberPorts(file, ['smtp', 'mailPage'], 4173, freeFrom(4300));
    expect(await rememberPorts(file, ['smtp', 'mailPage'], 4173, freeFrom(4000))).toEqual(first);
  });
});

describe('secrets', () => {
  const everything = { isDemonstration: true, withDatabase: true };

  test('are made once, kept, and read by their owner alone', () => {
    const file = join(folder, 'secrets.json');
    const first = keepSecrets(file, everything);
    expect(keepSecrets(file, everything)).toEqual(first);
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(JSON.parse(readFileSync(file, 'utf8'))).toEqual(first);
  });

  test('live mode makes those of its private database and no other', () => {
    const names = Object.keys(keepSecrets(join(folder, 's'), { isDemonstration: false, withDatabase: true }));
    expect(names).toEqual(['databaseSuperuser', 'databaseOwner', 'databaseApp']);
  });
});

describe('the environment of the application', () => {
  const database = { url: 'postgres://app@db/t', ownerUrl: 'postgres://owner@db/t' };
  const parts = { port: 4173, database, secrets: {}, ports: { smtp: 4185 } };

  test('never holds the owner’s address', () => {
    const env = { DATABASE_OWNER_URL: database.ownerUrl };
    const settings = { mode: 'live', data: '/data', isDemonstration: false };
    const told = appEnvironment({ env, settings, ...parts });
    expect(JSON.stringify(told)).not.toContain('owner@db');
    expect(told.DATABASE_URL).toBe(database.url);
  });

  test('in the demonstration names the stand-in even where a real mail server was set', () => {
    const env = { TREENAIL_SMTP_URL: 'smtps://mail.brackenhythe.example' };
    const settings = { mode: 'demonstration', data: '/data', isDemonstration: true };
    expect(appEnvironment({ env, settings, ...parts }).TREENAIL_SMTP_URL).toBe('smtp://127.0.0.1:4185');
  });

  test('in live mode passes on what was set and invents nothing', () => {
    const env = { TREENAIL_SMTP_URL: 'smtps://mail.brackenhythe.example' };
    const settings = { mode: 'live', data: '/data', isDemonstration: false };
    const told = appEnvironment({ env, settings, ...parts });
    expect(told.TREENAIL_SMTP_URL).toBe(env.TREENAIL_SMTP_URL);
    expect(told).not.toHaveProperty('TREENAIL_PAYMENT_KEY');
    expect(told).not.toHaveProperty('TREENAIL_SESSION_SECRET');
  });
});
