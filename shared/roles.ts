// Who does what at the desk. A person may hold several roles.
import { z } from 'zod';

export const ROLES = ['chair', 'treasurer', 'secretary', 'site', 'schools', 'examiner'] as const;
export const roleSchema = z.enum(ROLES);
export type Role = z.infer<typeof roleSchema>;

/** Whoever can move money or people must prove it twice. */
export const SECOND_FACTOR_ROLES: readonly Role[] = ['chair', 'treasurer'];
export const needsSecondFactor = (roles: readonly Role[]): boolean =>
  roles.some((role) => SECOND_FACTOR_ROLES.includes(role));

/** Names withheld by their givers are the treasurer's alone. */
export const maySeeWithheldNames = (roles: readonly Role[]): boolean => roles.includes('treasurer');

export const NAME_WITHHELD = 'name withheld';
