// What other rooms may use of supporters and their consents.
export { keepSupporter } from './supporters-service.ts';
export { CHANNELS, keepConsents, listConsents, type Channel, type KeptConsent } from './consents-service.ts';
