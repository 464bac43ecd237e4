// One copy a data folder: a living holder is respected, a dead one's lock is taken over.
import { execFileSync, spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { takeLock, withLock } from '#server/platform/start-up/locks.mjs';
import { identify, isSameProcess } from '#server/platform/start-up/processes.mjs';
import { alreadyRunning } from '#server/platform/start-up/words.mjs';

let folder = '';
let path = '';
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'treenail-lock-'));
  path = join(folder, 'lock.json');
});
afterEach(() => rmSync(folder, { recursive: true }));

/** The number of a process that has ended. */
const deadPid = () => Number(execFileSync(process.execPath, ['-p', 'process.pid'], { encoding: 'utf8' }));

describe('the lock of a data folder', () => {
  test('a second taker, while the first lives, learns who holds it and where the site is', () => {
    const first = takeLock(path);
    first.held?.tell({ address: 'http://localhost:4173' });
    const second = takeLock(path);
    expect(second.held).toBeUndefined();
    expect(second.heldBy).toMatchObject({ pid: process.pid, address: 'http://localhost:4173' });
  });

  test('a released lock is gone and can be taken anew', () => {
    takeLock(path).held?.release();
    expect(existsSync(path)).toBe(false);
    expect(takeLock(path).held).toBeDefined();
  });

  test('the lock of a dead process is taken over', () => {
    writeFileSync(path, JSON.stringify({ ...identify(process.pid), pid: deadPid() }));
    expect(takeLock(path).held).toBeDefined();
    expect(JSON.parse(readFileSync(path, 'utf8'))).toMatchObject({ pid: process.pid });
  });

  test('a living process that merely has the number of the dead holder is not taken for it', () => {
    writeFileSync(path, JSON.stringify({ ...identify(process.ppid), started: '1' }));
    expect(takeLock(path).held).toBeDefined();
  });

  test('a lock that makes no sense is taken over', () => {
    writeFileSync(path, '{"pid":');
    expect(takeLock(path).held).toBeDefined();
  });

  test('releasing does not remove a lock that somebody else took meanwhile', () => {
    const mine = takeLock(path);
    writeFileSync(path, JSON.stringify(identify(process.ppid)));
    mine.held?.release();
    expect(existsSync(path)).toBe(true);
  });

  test('of many processes that take it over at once exactly one holds it', async () => {
    writeFileSync(path, JSON.stringify({ ...identify(process.pid), pid: deadPid() }));
    const locks = JSON.stringify(new URL('../../server/platform/start-up/locks.mjs', import.meta.url).href);
    const script = `import(${locks}).then(({ takeLock }) => {
      process.stdout.write(takeLock(${JSON.stringify(path)}).held ? 'held' : 'refused');
      process.stdin.resume();
    })`;
    const children = Array.from({ length: 6 }, () => spawn(process.execPath, ['-e', script]));
    const answers = await Promise.all(
      children.map(
        (child) => new Promise<string>((resolve) => child.stdout.once('data', (b) => resolve(String(b)))),
      ),
    );
    for (const child of children) child.kill();
    expect(answers.filter((answer) => answer === 'held')).toHaveLength(1);
  });

  test('work under a lock takes its turn and lets go after a failure', async () => {
    const done: string[] = [];
    const failing = withLock(path, async () => {
      await new Promise((resolve) => setTimeout(resolve, 50));
      done.push('first');
      throw new Error('broken');
    });
    await expect(failing).rejects.toThrow('broken');
    await withLock(path, () => Promise.resolve(done.push('second')));
    expect(done).toEqual(['first', 'second']);
  });
});

describe('a noted process', () => {
  test('this one is itself, and one of an earlier boot is not', () => {
    expect(isSameProcess(identify(process.pid))).toBe(true);
    expect(isSameProcess({ ...identify(process.pid), boot: 'another' })).toBe(false);
  });
});

describe('the words for a second copy', () => {
  test('name the folder, the process, the address and both ways out', () => {
    const words = alreadyRunning({ pid: 42, address: 'http://localhost:4173' }, '/data');
    for (const part of ['/data', '42', 'http://localhost:4173', 'Ctrl-C', 'TREENAIL_DATA']) {
      expect(words).toContain(part);
    }
  });
});
