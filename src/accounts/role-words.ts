// What the desk calls each role.
import type { Role } from '#shared/roles.ts';

const WORDS: Record<Role, string> = {
  chair: 'chair',
  treasurer: 'treasurer',
  secretary: 'secretary',
  site: 'site lead',
  schools: 'schools’ lead',
  examiner: 'examiner',
};

const list = new Intl.ListFormat('en-GB');

/** “treasurer and secretary” */
export const roleWords = (roles: readonly Role[]): string => list.format(roles.map((role) => WORDS[role]));
