// Names withheld by their givers: the one rule of who may see them, so that no other column leaves the database.
import { maySeeWithheldNames, NAME_WITHHELD, type Role } from '#shared/roles.ts';

export type Reader = { roles: readonly Role[] };

/** Of a query that names gifts `g` and supporters `s`. */
export const WITHHELD_SQL = `(s.is_name_withheld or g.name_shown = 'treasurer-only')`;

/**
 * A column that could name the giver, as SQL: for all but the treasurer it is null when the giver asked to be
 * hidden, so that what must not be seen is never read. `column` is our own SQL, never input.
 */
export const unlessWithheld = (reader: Reader, column: string): string =>
  maySeeWithheldNames(reader.roles) ? column : `(case when not ${WITHHELD_SQL} then ${column} end)`;

/** Every column by its alias, each hidden where it must be. */
export const allUnlessWithheld = (reader: Reader, columns: Record<string, string>): string =>
  Object.entries(columns)
    .map(([alias, column]) => `${unlessWithheld(reader, column)} as ${alias}`)
    .join(', ');

export const nameOrWithheld = (name: string | null): string => name ?? NAME_WITHHELD;

/** Who reads gifts, and who among them answers for the people behind them. */
export const GIFT_ROLES = ['chair', 'treasurer', 'secretary', 'examiner'] as const satisfies readonly Role[];
export const PEOPLE_ROLES = ['chair', 'secretary', 'treasurer'] as const satisfies readonly Role[];

/** Nobody judges words or letters that they may not read. */
export const mayAct = (reader: Reader, isWithheld: boolean): boolean =>
  reader.roles.some((role) => PEOPLE_ROLES.some((one) => one === role)) &&
  (!isWithheld || maySeeWithheldNames(reader.roles));
