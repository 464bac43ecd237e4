// The levelling staff beside the figure: blocks of ten centimetres, a longer one at each, a tick at each metre.
const GROUND_Y = 740;
const LEFT = 426;
const MIDDLE = 439;
const RIGHT = 452;

const box = (x1: number, y1: number, x2: number, y2: number): string => `M${x1} ${y1}H${x2}V${y2}H${x1}Z`;

function block(decimetre: number): string {
  const top = GROUND_Y - 10 * (decimetre + 1);
  const isLong = decimetre % 10 < 5 ? decimetre % 2 === 0 : decimetre % 2 === 1;
  if (decimetre % 10 < 5) return box(LEFT, top, isLong ? MIDDLE : LEFT + 4, top + 10);
  return box(isLong ? MIDDLE : RIGHT - 4, top, RIGHT, top + 10);
}

const tick = (y: number): string => box(LEFT - 8, y - 0.7, LEFT, y + 0.7);

export type StaffDrawing = { paper: string; ink: string; metres: { label: string; y: number }[] };

export function drawStaff(heightMm: number): StaffDrawing {
  const topY = GROUND_Y - heightMm / 10;
  const decimetres = Math.floor(heightMm / 100);
  const metres = Array.from({ length: Math.floor(heightMm / 1000) + 1 }, (_, metre) => metre);
  const blocks = Array.from({ length: decimetres }, (_, index) => block(index));
  const ticks = metres.map((metre) => tick(GROUND_Y - metre * 100));
  return {
    paper: box(LEFT, topY, RIGHT, GROUND_Y),
    ink: [...blocks, ...ticks, tick(topY)].join(''),
    // A metre mark that would touch the mark of her height gives way to it.
    metres: metres
      .filter((metre) => heightMm - metre * 1000 > 300)
      .map((metre) => ({ label: String(metre), y: GROUND_Y - metre * 100 - 4 })),
  };
}
