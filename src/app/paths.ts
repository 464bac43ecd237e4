// Every address of the site, in one place.
export const paths = {
  home: '/',
  part: (slug: string) => `/parts/${slug}`,
  give: '/give',
  giveTowards: (slug: string) => `/give?towards=${encodeURIComponent(slug)}`,
  giveCheck: '/give/check',
  giveDone: '/give/done',
  receipt: (token: string) => `/receipts/${token}`,
  receiptPdf: (token: string) => `/receipts/${token}.pdf`,
  privacy: '/privacy',
  promise: '/promise',
  usingThisSite: '/using-this-site',
  desk: '/desk',
} as const;

/** The desk is drawn in the browser only. */
export const isDeskPath = (pathname: string): boolean => /^\/desk(\/|$)/.test(pathname);

/** Giving has a form, which most readers never open: its part of the program is loaded when it is. */
export const isGivePath = (pathname: string): boolean => /^\/(give|receipts)(\/|$)/.test(pathname);
