// Says in words what the nightly checks found, and which stand still or never ran. Pure.
import { formatMoment } from '#shared/dates.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import type { FailedCheck } from './check-reads.ts';
import { tellWait } from './owed-rows.ts';

const checkName = (check: FailedCheck): string => check.name.replaceAll('_', ' ');

export function failedCheckRow(check: FailedCheck, now: Date): OwedRow {
  const count = check.faults === 1 ? '1 fault' : `${check.faults} faults`;
  return {
    id: `check-${check.name}`,
    ...tellWait(check.ranAt, now, 0),
    what: `The nightly check “${checkName(check)}” found ${count}`,
    owedTo: 'the books',
    detail: check.detail,
    action: { kind: 'look', label: 'See more' },
  };
}

/** Checks stand still together, most likely because the worker does: one row, not one each. */
export function stillChecksRow(checks: readonly FailedCheck[], now: Date): OwedRow[] {
  const [oldest] = checks;
  if (!oldest) return [];
  const which =
    checks.length === 1
      ? `The nightly check “${checkName(oldest)}” has`
      : `${checks.length} nightly checks have`;
  return [
    {
      id: 'checks-still',
      ...tellWait(oldest.ranAt, now, 0),
      what: `${which} not run since ${formatMoment(oldest.ranAt)}`,
      owedTo: 'the books',
      detail: checks.map((one) => `${checkName(one)}, last run ${formatMoment(one.ranAt)}`),
      action: { kind: 'look', label: 'See more' },
    },
  ];
}

/** Nobody knows whether the books agree until each check has run once. Owed from now: no day was missed yet. */
export function neverRunRow(names: readonly string[], now: Date): OwedRow[] {
  if (names.length === 0) return [];
  const which = names.length === 1 ? 'A nightly check has' : `${names.length} nightly checks have`;
  return [
    {
      id: 'checks-never-run',
      ...tellWait(now, now, 0),
      what: `${which} never run`,
      owedTo: 'the books',
      detail: names.map((name) => name.replaceAll('_', ' ')),
      action: { kind: 'look', label: 'See more' },
    },
  ];
}
