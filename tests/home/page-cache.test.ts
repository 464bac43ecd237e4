// Pages that are drawn once for everybody: once per change, one at a time, never from before a change.
import { describe, expect, it } from 'vitest';
import { createDrawnOnce } from '#server/platform/pages/index.ts';

function world() {
  const listeners: (() => void)[] = [];
  const begun: { key: string; finish: (value?: string) => void; fail: (error: Error) => void }[] = [];
  return {
    changes: { onChange: (_channel: string, listener: () => void) => void listeners.push(listener) },
    change: () => listeners.forEach((listener) => listener()),
    begun,
    draw: (key: string) =>
      new Promise<string>((resolve, reject) => {
        const number = begun.length + 1;
        begun.push({ key, finish: (value = `${key} ${number}`) => resolve(value), fail: reject });
      }),
  };
}

describe('createDrawnOnce', () => {
  it('draws once for all who ask at the same time and after', async () => {
    const { changes, draw, begun } = world();
    const drawn = createDrawnOnce(changes, draw);
    const [first, second] = [drawn.get('/'), drawn.get('/')];
    begun[0]?.finish();
    expect(await Promise.all([first, second, drawn.get('/')])).toEqual(['/ 1', '/ 1', '/ 1']);
    expect(begun).toHaveLength(1);
  });

  it('draws each address by itself', async () => {
    const { changes, draw, begun } = world();
    const drawn = createDrawnOnce(changes, draw);
    const both = [drawn.get('/'), drawn.get('/parts/body')];
    for (const one of begun) one.finish();
    expect(await Promise.all(both)).toEqual(['/ 1', '/parts/body 2']);
  });

  it('draws again after a change, and once', async () => {
    const { changes, change, draw, begun } = world();
    const drawn = createDrawnOnce(changes, draw);
    const before = drawn.get('/');
    begun[0]?.finish();
    await before;
    change();
    const after = [drawn.get('/'), drawn.get('/')];
    begun[1]?.finish();
    expect(await Promise.all(after)).toEqual(['/ 2', '/ 2']);
  });

  it('gives nobody who asks after a change what was begun before it, even if that ends later', async () => {
    const { changes, change, draw, begun } = world();
    const drawn = createDrawnOnce(changes, draw);
    const early = drawn.get('/');
    change();
    const late = drawn.get('/');
    begun[1]?.finish();
    expect(await late).toBe('/ 2');
    begun[0]?.finish();
    await early;
    expect(await drawn.get('/')).toBe('/ 2');
    expect(begun).toHaveLength(2);
  });

  it('keeps neither a failure nor what may not be kept', async () => {
    const { changes, draw, begun } = world();
    const drawn = createDrawnOnce(changes, draw, { mayKeep: (page) => page !== 'missing' });
    const failed = drawn.get('/');
    begun[0]?.fail(new Error('away'));
    await expect(failed).rejects.toThrow('away');
    const missing = drawn.get('/');
    begun[1]?.finish('missing');
    expect(await missing).toBe('missing');
    expect(drawn.count()).toBe(0);
    const found = drawn.get('/');
    begun[2]?.finish();
    expect(await found).toBe('/ 3');
    expect(drawn.count()).toBe(1);
  });

  it('keeps no more than it may', async () => {
    const { changes } = world();
    const drawn = createDrawnOnce(changes, (key) => Promise.resolve(key), { mostKept: 3 });
    for (const key of ['a', 'b', 'c', 'd', 'e']) await drawn.get(key);
    expect(drawn.count()).toBe(3);
  });
});
