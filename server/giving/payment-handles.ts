// How the desk names a payment: by the card service's own id, never by the intent's, which opens the giver's receipt.

/**
 * Of a query on gift_intents. A payment whose card page was never told to us is named by a fingerprint, from
 * which nobody finds the id again.
 */
export const INTENT_HANDLE_SQL = `coalesce(gift_intents.session_id,
  'unnamed-' || left(encode(sha256(convert_to(gift_intents.id::text, 'UTF8')), 'hex'), 24))`;

const UUID = /[0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12}/gi;

/** A fault's words may repeat an id of ours. */
export const withoutIds = (fault: string | null): string | null => fault?.replaceAll(UUID, '…') ?? null;
