// Kept pages and the clock: nothing is kept for long or past midnight, and a wrong address takes nobody's place.
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { createDrawnOnce } from '#server/platform/pages/index.ts';

const never = { onChange: () => undefined };
const MINUTE_MS = 60_000;

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

function count() {
  let drawings = 0;
  return createDrawnOnce(never, (key) => Promise.resolve(`${key} ${(drawings += 1)}`), {
    mostKept: 2,
    mayKeep: (drawn) => !drawn.startsWith('/parts/none'),
  });
}

describe('a kept page', () => {
  test('is drawn once within five minutes, and again after', async () => {
    vi.setSystemTime('2027-05-05T12:00:00Z');
    const drawn = count();
    expect(await drawn.get('/')).toBe('/ 1');
    vi.advanceTimersByTime(5 * MINUTE_MS - 1);
    expect(await drawn.get('/')).toBe('/ 1');
    vi.advanceTimersByTime(1);
    expect(await Promise.all([drawn.get('/'), drawn.get('/')])).toEqual(['/ 2', '/ 2']);
    expect(drawn.count()).toBe(1);
  });

  test('is forgotten at midnight in London, which in summer is an hour before midnight in Greenwich', async () => {
    vi.setSystemTime('2027-05-05T22:59:00Z');
    const drawn = count();
    await drawn.get('/');
    vi.advanceTimersByTime(MINUTE_MS);
    expect(await drawn.get('/')).toBe('/ 2');
  });

  test('is not pushed out by addresses that lead nowhere', async () => {
    const drawn = count();
    await drawn.get('/');
    for (let number = 0; number < 5; number += 1) await drawn.get(`/parts/none-${number}`);
    expect(await drawn.get('/')).toBe('/ 1');
    // Not even while they are being drawn.
    const asked = Array.from({ length: 5 }, (_, number) => drawn.get(`/parts/none-${number}`));
    expect(await drawn.get('/')).toBe('/ 1');
    await Promise.all(asked);
  });
});
