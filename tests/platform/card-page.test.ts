// The stand-in's card page is reached where the site is reached; its controls never leave this machine.
import { mkdtempSync, rmSync } from 'node:fs';
import { networkInterfaces, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { startPaymentService } from '#fakes/payment-service/start-payment-service.ts';
import { cardPageOrigin, standInEnvironments } from '#server/platform/start-up/environment.mjs';

describe('where a browser finds the card page', () => {
  const ports = { paymentService: 4181, paymentControls: 4182 };
  test.each([
    [undefined, 'http://127.0.0.1:4181'],
    ['http://localhost:4173', 'http://127.0.0.1:4181'],
    ['http://192.0.2.7:4173', 'http://192.0.2.7:4181'],
    ['http://oak.example:4173/', 'http://oak.example:4181'],
    ['no address', 'http://127.0.0.1:4181'],
  ])('for a site at %s it is %s', (publicAddress, origin) => {
    expect(cardPageOrigin({ publicAddress }, ports)).toBe(origin);
    const settings = { data: '/data', ...(publicAddress && { publicAddress }) };
    const told = standInEnvironments({ env: {}, settings, port: 4173, secrets: {}, ports });
    expect(told['payment-service'].PAYMENT_SERVICE_PUBLIC).toBe(origin);
  });
});

const outside = Object.values(networkInterfaces())
  .flatMap((list) => list ?? [])
  .find((one) => !one.internal && one.family === 'IPv4')?.address;

async function answers(url: string): Promise<boolean> {
  return fetch(url, { signal: AbortSignal.timeout(2_000) }).then(
    () => true,
    () => false,
  );
}

describe.skipIf(outside === undefined)('from another machine', () => {
  let stateFolder = '';
  beforeEach(() => {
    stateFolder = mkdtempSync(join(tmpdir(), 'treenail-cards-'));
  });
  afterEach(() => rmSync(stateFolder, { recursive: true }));

  const seen = (url: string) => `http://${outside ?? ''}:${new URL(url).port}/`;

  test.each([
    [undefined, false],
    ['http://127.0.0.1:4181', false],
    [`http://${outside ?? ''}:4181`, true],
  ])('with the card page at %s, it is reached: %s', async (publicUrl, isReached) => {
    const running = await startPaymentService({ key: 'sk_test_invented', stateFolder, publicUrl });
    try {
      expect(await answers(running.apiUrl)).toBe(true);
      expect(await answers(running.controlUrl)).toBe(true);
      expect(await answers(seen(running.apiUrl))).toBe(isReached);
      expect(await answers(seen(running.controlUrl))).toBe(false);
    } finally {
      await running.stop();
    }
  });
});
