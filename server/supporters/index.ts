// What other rooms may use of supporters and their consents.
export {
  CHANNELS,
  keepConsents,
  keepSupporter,
  listConsents,
  type Channel,
  type KeptConsent,
} from './supporters-service.ts';
