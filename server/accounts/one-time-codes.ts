// One-time codes (RFC 6238: six figures, a new one every 30 seconds) and the recovery codes that stand in for them.
import { createHash, randomInt } from 'node:crypto';
import { generateSecret, generateURI, verify } from 'otplib';
import QRCode from 'qrcode';
import type { SecondFactorOffer } from '#shared/accounts/session-schemas.ts';

const STEP_SECONDS = 30;
const ISSUER = 'Treenail';
// No letters or figures that are mistaken for each other on paper.
const ALPHABET = 'abcdefghjkmnpqrstuvwxyz23456789';
const RECOVERY_CODES = 10;
const GROUPS = 3;
const GROUP_LENGTH = 4;

export const newSecret = (): string => generateSecret();

/** The dark squares of the picture, row by row, each run as one stroke of the path. */
function drawPicture(uri: string): SecondFactorOffer['picture'] {
  const { size, data } = QRCode.create(uri, { errorCorrectionLevel: 'M' }).modules;
  let path = '';
  for (let y = 0; y < size; y += 1) {
    for (let x = 0; x < size; x += 1) {
      let run = 0;
      while (x + run < size && data[y * size + x + run]) run += 1;
      if (run > 0) path += `M${x} ${y}h${run}v1h-${run}z`;
      x += run;
    }
  }
  return { size, path };
}

export function describeSecret(secret: string, email: string): Omit<SecondFactorOffer, 'session'> {
  const uri = generateURI({ issuer: ISSUER, label: email, secret });
  return { secret, uri, picture: drawPicture(uri) };
}

/** The time step that the code belongs to: this one, the last or the next, since clocks differ. */
export async function findTimeStep(secret: string, code: string): Promise<number | undefined> {
  const result = await verify({ secret, token: code, epochTolerance: STEP_SECONDS });
  return result.valid && 'timeStep' in result ? result.timeStep : undefined;
}

export const newRecoveryCodes = (): string[] =>
  Array.from({ length: RECOVERY_CODES }, () =>
    Array.from({ length: GROUPS }, () =>
      Array.from({ length: GROUP_LENGTH }, () => ALPHABET[randomInt(ALPHABET.length)]).join(''),
    ).join('-'),
  );

/** Near 60 random bits: a plain digest is enough, no dictionary holds them. */
export const hashRecoveryCode = (code: string): string =>
  createHash('sha256')
    .update(code.toLowerCase().replaceAll(/[^a-z0-9]/g, ''))
    .digest('base64url');
