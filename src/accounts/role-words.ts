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

export const roleWords = (roles: readonly Role[]): string => roles.map((role) => WORDS[role]).join(', ');
