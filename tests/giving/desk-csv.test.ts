// The list of gifts as CSV: whole, and harmless to whoever opens it.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { pence } from '#shared/money.ts';
import { addGift } from './desk-rows.ts';
import { openDesk, type Desk } from './desk-app.ts';

let desk: Desk;
beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk.app.stop());

describe('the CSV', () => {
  it('has no cell that a spreadsheet would run, whatever a giver calls themselves', async () => {
    const names = [
      "=cmd|' /C calc'!A0",
      '+1+1',
      '-2+3',
      '@SUM(A1)',
      '\tTab',
      '\rReturn',
      '＝1+1',
      'Comma, "quote"',
      'Two\nlines',
      'Łódź Żółć',
    ];
    for (const name of names)
      await addGift(desk.db, desk.world, {
        name,
        part: 'lantern',
        at: new Date('2026-02-01T10:00:00Z'),
        ...(name === '+1+1' && { sumPence: pence(123_405) }),
      });
    const answer = await desk
      .as('treasurer')
      .get('/api/desk/gifts.csv?from=2026-02-01&to=2026-02-01&sort=oldest');
    expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(answer.headers['content-disposition']).toMatch(
      /^attachment; filename="gifts-\d{4}-\d\d-\d\d\.csv"$/,
    );
    expect(answer.text.startsWith('\ufeff"No."')).toBe(true);
    expect(answer.text.endsWith('\r\n')).toBe(true);
    const cells = [...answer.text.matchAll(/"((?:[^"]|"")*)"/g)].map(([, cell = '']) =>
      cell.replaceAll('""', '"'),
    );
    expect(cells.filter((cell) => /^[=+\-@\t\r\n\0＝＋－＠]/.test(cell))).toEqual([]);
    expect(cells).toEqual(
      expect.arrayContaining([
        "'=cmd|' /C calc'!A0",
        'Comma, "quote"',
        'Two\nlines',
        'Łódź Żółć',
        '2026-02-01',
        '20.00',
        '1234.05',
        '10:00',
        'not public',
      ]),
    );
    expect(cells).toHaveLength((names.length + 1) * 12);
  });

  it('says beside each name where it may be shown, and the time by the 24-hour London clock', async () => {
    const at = new Date('2026-07-03T20:05:00Z');
    await addGift(desk.db, desk.world, { at, name: 'Hidden Hollis', nameShown: 'treasurer-only' });
    await addGift(desk.db, desk.world, { at, name: 'Quiet Quillan', nameShown: 'not-public' });
    const path = '/api/desk/gifts.csv?from=2026-07-03&to=2026-07-03';
    const forTreasurer = (await desk.as('treasurer').get(path)).text;
    expect(forTreasurer).toContain('"From whom","Name shown"');
    expect(forTreasurer).toContain('"2026-07-03","21:05","Hidden Hollis","treasurer only"');
    expect(forTreasurer).toContain('"21:05","Quiet Quillan","not public"');
    expect((await desk.as('chair').get(path)).text).toContain('"name withheld","treasurer only"');
  });

  it('holds every gift of the filter, not only a page, and leaves an audit line', async () => {
    const at = new Date('2026-01-15T10:00:00Z');
    for (let batch = 0; batch < 6; batch += 1)
      await Promise.all(
        Array.from({ length: 100 }, () => addGift(desk.db, desk.world, { at, thanks: null })),
      );
    const answer = await desk.as('examiner').get('/api/desk/gifts.csv?from=2026-01-15&to=2026-01-15');
    const lines = answer.text.trim().split('\r\n');
    expect(lines).toHaveLength(601);
    expect(new Set(lines).size).toBe(601);
    const [line] = await desk
      .db('audit.lines')
      .where({ action: 'gifts-exported', actor_id: desk.as('examiner').accountId })
      .orderBy('id', 'desc')
      .select<{ object_id: string }[]>('object_id');
    expect(line?.object_id).toContain('from=2026-01-15');
  }, 60_000);
});
