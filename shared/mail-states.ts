// How a letter may stand, and when a letter that is put off becomes a person's business.
export const MAIL_STATES = [
  'queued',
  'claimed',
  'handing_over',
  'sent',
  'soft_failed',
  'hard_failed',
  'suppressed',
  'uncertain',
] as const;

/** A letter that failed this often (for some 20 minutes) is no passing trouble, and a person should know. */
export const TRIES_TO_TELL = 3;
