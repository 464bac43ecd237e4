// Which refusals have a page of their own.
import { toPageFault } from '#src/lib/page-fault.ts';

export const isForbidden = (error: unknown): boolean => error !== null && toPageFault(error).status === 403;
export const isMissing = (error: unknown): boolean =>
  error !== null && toPageFault(error).kind === 'not-found';
