// Which addresses are pages, which of them are kept for all, and which may never be kept anywhere.
const KEPT = /^\/$|^\/(privacy|promise|using-this-site)$|^\/parts\/[a-z0-9-]{1,80}$/;
const NEVER_KEPT = /^\/(give|receipts|desk)(\/|$)/i;
const NOT_A_PAGE = /^\/(api|webhooks|healthz|assets)(\/|$)/;

/** What an address is kept under, or null where each reader's page is their own. A query changes nothing. */
export function keptUnder(path: string): string | null {
  const bare = path.length > 1 ? path.replace(/\/+$/, '') : path;
  return KEPT.test(bare) ? bare : null;
}

export const isNeverKept = (path: string): boolean => NEVER_KEPT.test(path);
export const isPagePath = (path: string): boolean => !NOT_A_PAGE.test(path);
export const isDeskPath = (path: string): boolean => /^\/desk(\/|$)/.test(path);
