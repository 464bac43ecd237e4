// The figure's pure rules: the drawing split into parts, heights as classes, labels, order, sentences.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { heightClass } from '#src/home/height-class.ts';
import { orderForLedger, placeOf } from '#src/home/part-place.ts';
import { inSentence } from '#src/home/part-words.ts';
import { reachSentence, standsToday } from '#src/home/reach-words.ts';
import { labelRungs } from '#src/home/rung-labels.ts';
import { splitDrawing } from '#src/home/split-drawing.ts';
import { drawStaff } from '#src/home/staff-drawing.ts';
import { lampwoman } from './lampwoman.ts';

describe('splitDrawing', () => {
  it('finds every part of the stored elevation in building order', () => {
    const { drawing, parts } = lampwoman();
    const drawn = splitDrawing(drawing);
    expect(drawn.map(({ slug }) => slug)).toEqual(parts.map(({ slug }) => slug));
    for (const { slug, paths } of drawn) expect(paths[0]?.kind, slug).toBe('sil');
    expect(drawn.flatMap(({ paths }) => paths)).toHaveLength(drawing.match(/<path/g)?.length ?? 0);
  });

  it('takes nothing but paths of known kinds, whatever else a drawing holds', () => {
    const hostile = `<script>alert(1)</script><g id="part-a" class="part" onclick="x()">
      <path class="sil" d="M0 0L1 1Z"/><path class="sil" d="M0 0" onload="x()"/><image href="x"/>
      <path class="other" d="M0 0"/><path class="cut" d="M0 0url(#x)"/></g>`;
    expect(splitDrawing(hostile)).toEqual([{ slug: 'a', paths: [{ kind: 'sil', d: 'M0 0L1 1Z' }] }]);
  });
});

describe('heightClass', () => {
  it('writes a height as four digits', () => {
    expect(heightClass(4951)).toBe('mm-a4 mm-b9 mm-c5 mm-d1');
    expect(heightClass(0)).toBe('mm-a0 mm-b0 mm-c0 mm-d0');
    expect(heightClass(50)).toBe('mm-a0 mm-b0 mm-c5 mm-d0');
  });

  it('keeps a height that has no four digits within what can be written', () => {
    expect(heightClass(12_000)).toBe('mm-a9 mm-b9 mm-c9 mm-d9');
    expect(heightClass(-3)).toBe('mm-a0 mm-b0 mm-c0 mm-d0');
  });

  it('can be read back for every whole height', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9999 }), (mm) => {
        expect(Number(heightClass(mm).replaceAll(/[^0-9]/g, ''))).toBe(mm);
      }),
    );
  });
});

describe('reachSentence', () => {
  it.each([
    [0, 'It begins on the footing.'],
    [6_400, 'It builds her to the top of the footing.'],
    [7_000, 'It builds her past the footing.'],
    [37_500, 'It builds her to the top of the shoulders.'],
    [41_280, 'It builds her to the elbow.'],
    [83_999, 'It builds her past the forearm and hand.'],
    [84_000, 'She is paid for, all 7.2 metres.'],
  ])('tells what £%d builds', (givenPounds, sentence) => {
    expect(reachSentence(lampwoman({ givenPounds }))).toBe(sentence);
  });

  it('speaks of a figure by its own pronoun', () => {
    expect(reachSentence({ ...lampwoman({ givenPounds: 84_000 }), pronoun: 'them' })).toBe(
      'They are paid for, all 7.2 metres.',
    );
    expect(standsToday('it')).toBe('As it stands today');
    expect(standsToday('them')).toBe('As they stand today');
  });

  it('names parts inside a sentence without doubling the article', () => {
    expect(inSentence('The 24 panes')).toBe('the 24 panes');
    expect(inSentence('Lantern frame')).toBe('the lantern frame');
  });
});

describe('labelRungs', () => {
  const { reach } = lampwoman();

  it('leaves no two readable labels closer than 16 px on a full figure', () => {
    const shown = labelRungs(reach.rungs, reach.heightMm).filter((label) => label.crowded !== 'always');
    const heights = [...shown.map((label) => label.topMm), reach.heightMm].sort((a, b) => a - b);
    const gaps = heights.slice(1).map((height, index) => height - (heights[index] ?? 0));
    expect(Math.min(...gaps)).toBeGreaterThanOrEqual(170);
    expect(shown.at(-1)).toMatchObject({ topMm: 7200, isTop: true });
  });

  it('keeps every sum for who listens', () => {
    expect(labelRungs(reach.rungs, reach.heightMm)).toHaveLength(reach.rungs.length);
  });

  it('lets the top label go where the lamp tag stands on it', () => {
    expect(labelRungs(reach.rungs, 7200).at(-1)?.crowded).toBe('always');
  });
});

describe('the ledger', () => {
  it('puts the lamp rule between what is paid for and what is not', () => {
    const { parts, reach } = lampwoman({ withLifting: true });
    const { above, below, costs } = orderForLedger(parts, reach.part);
    expect(above.map(({ slug }) => slug).at(-1)).toBe(reach.part);
    expect(below.every((part) => part.stillNeededPence === 0)).toBe(true);
    expect([...above, ...below].map(({ slug }) => slug)).not.toContain('lifting');
    expect(costs.map(({ slug }) => slug)).toEqual(['lifting']);
  });

  it('puts everything below the rule when all is paid, and above it when nothing is', () => {
    const all = lampwoman({ givenPounds: 84_000 });
    expect(orderForLedger(all.parts, all.reach.part).above).toEqual([]);
    const none = lampwoman({ givenPounds: 0 });
    expect(orderForLedger(none.parts, none.reach.part).below).toEqual([]);
  });

  it('tells a cost without height by the part it follows', () => {
    const { parts } = lampwoman({ withLifting: true });
    expect(placeOf(parts, { slug: 'lifting' })).toBe('after the shoulders');
    const [lifting] = parts.filter(({ slug }) => slug === 'lifting');
    expect(lifting && placeOf([lifting, ...parts], lifting)).toBe('before anything is built');
  });
});

describe('drawStaff', () => {
  it('marks every metre that does not touch the mark of her height', () => {
    expect(drawStaff(7200).metres.map(({ label }) => label)).toEqual(['0', '1', '2', '3', '4', '5', '6']);
    expect(drawStaff(7200).paper).toBe('M426 20H452V740H426Z');
  });
});
