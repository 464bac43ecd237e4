// Three sentences that follow the figure's state.
import { expect, test } from 'vitest';
import { describeFigure, formatMetres } from '#shared/campaign/description-rules.ts';
import { pence } from '#shared/money.ts';

const part = (
  name: string,
  state: 'planned' | 'paid' | 'making' | 'placed',
  stillNeeded = 0,
  topMm = 500,
) => ({
  name,
  state,
  stillNeededPence: pence(stillNeeded),
  topMm,
});

test('each kind of part is told in its own sentence', () => {
  expect(
    describeFigure([
      part('Footing', 'placed'),
      part('Lower skirt', 'placed', 0, 2_100),
      part('Body', 'making'),
      part('Left arm', 'paid'),
      part('Forearm and hand', 'planned', 395_500),
      part('The 24 panes', 'planned', 1_417_500),
    ]),
  ).toEqual([
    'The footing and the lower skirt are in place. The figure stands 2.1 m above the ground today.',
    'The body is being made; the left arm is paid for and next in turn.',
    'The forearm and hand need £3,955 more; after that come the 24 panes.',
  ]);
});

test('an empty green and a finished figure read rightly', () => {
  expect(describeFigure([part('Footing', 'planned', 100)])).toEqual([
    'Nothing of the figure stands yet.',
    'Nothing is being made just now.',
    'The footing needs £1 more.',
  ]);
  expect(describeFigure([part('Footing', 'placed')])).toEqual([
    'The whole figure is in place.',
    'Nothing is being made just now.',
    'Every part is paid for.',
  ]);
});

test('one part may be more than one thing', () => {
  expect(
    describeFigure([
      part('Head and scarf', 'making'),
      part('Left arm', 'planned', 100),
      part('Body', 'planned', 100),
    ]),
  ).toEqual([
    'Nothing of the figure stands yet.',
    'The head and scarf are being made.',
    'The left arm needs £1 more; after that comes the body.',
  ]);
});

test('heights are in metres without needless noughts', () => {
  expect([500, 4_920, 7_200, 1_000].map(formatMetres)).toEqual(['0.5 m', '4.92 m', '7.2 m', '1 m']);
});
