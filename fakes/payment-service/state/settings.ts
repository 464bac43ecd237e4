// How the stand-in is set to behave, and its clock: kept with the rest of the state.
import type { Service } from '../service.ts';
import type { Settings } from './rows.ts';
import type { Store } from './store.ts';

const ONLY_ROW = 'settings';

export const STILL: Settings['webhooks'] = {
  dropNext: 0,
  doubleNext: 0,
  reorderNext: 0,
  delayMs: 0,
  paused: false,
};
const START: Settings = {
  offsetMs: 0,
  feeDelayMs: 2000,
  slowDelayMs: 8000,
  webhooks: STILL,
  requests: { latencyMs: 0, cutNext: 0, failNext: 0 },
};

export const readSettings = (store: Store): Settings => store.settings.find(ONLY_ROW) ?? START;

export function changeSettings(service: Service, change: Partial<Settings>): Settings {
  const settings = { ...readSettings(service.store), ...change };
  service.store.settings.put(ONLY_ROW, settings);
  return settings;
}

export const changeWebhookMode = (service: Service, change: Partial<Settings['webhooks']>): Settings =>
  changeSettings(service, { webhooks: { ...readSettings(service.store).webhooks, ...change } });

export const changeRequestMode = (service: Service, change: Partial<Settings['requests']>): Settings =>
  changeSettings(service, { requests: { ...readSettings(service.store).requests, ...change } });
