// What other rooms may use of the society's own details, settings and wordings.
export { createSocietyRouter } from './society-routes.ts';
export { getGivingSettings, SETTING_KEYS, type GivingSettings } from './settings.ts';
export {
  addWording,
  getSociety,
  getWording,
  isGiftAidOffered,
  setSetting,
  writeSociety,
  type SocietyDetails,
  type Wording,
} from './society-store.ts';
