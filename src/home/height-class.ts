// A height in millimetres as classes, because a style attribute would be refused by the security policy.
const MOST_MM = 9_999;

/** 4951 is `mm-a4 mm-b9 mm-c5 mm-d1`; beside `at` they place an element at 4.951 m. */
export function heightClass(mm: number): string {
  const whole = Math.min(MOST_MM, Math.max(0, Math.round(mm)));
  const [a, b, c, d] = String(whole).padStart(4, '0');
  return `mm-a${a} mm-b${b} mm-c${c} mm-d${d}`;
}
