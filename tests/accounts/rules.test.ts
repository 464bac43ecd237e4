// The pure rules of accounts: passwords, codes, sealing, networks, and who may what.
import express from 'express';
import { generate } from 'otplib';
import fc from 'fast-check';
import QRCode from 'qrcode';
import supertest from 'supertest';
import { describe, expect, it } from 'vitest';
import { isCommonPassword, newPasswordSchema, repeatsPerson } from '#shared/accounts/password-rules.ts';
import { recoveryCodeSchema, secondFactorSchema, signInSchema } from '#shared/accounts/session-schemas.ts';
import {
  describeSecret,
  findTimeStep,
  hashRecoveryCode,
  newRecoveryCodes,
  newSecret,
} from '#server/accounts/one-time-codes.ts';
import { hashPassword, isPasswordRight } from '#server/accounts/passwords.ts';
import { seal, unseal } from '#server/accounts/sealing.ts';
import { networkOf } from '#server/accounts/tries.ts';
import { ownPath, withNext } from '#src/accounts/account-paths.ts';
import { requireJson } from '#server/platform/json-only.ts';

describe('a new password', () => {
  it.each([
    'password',
    'Password123!',
    'P@ssw0rd',
    'qwertyuiop',
    '12345678',
    '87654321',
    'aaaaaaaa',
    'abababab',
    'lampwoman2027',
    '1q2w3e4r',
    'letmein!!',
  ])('%s is refused as one that is guessed first', (password) =>
    expect(isCommonPassword(password)).toBe(true),
  );
  it.each(['every-peg-holds-fast', 'river-lamp-at-dusk', 'tidal ferry 6 onions', 'пароль из четырёх слов'])(
    '%s is taken',
    (password) => expect(newPasswordSchema.safeParse(password).success).toBe(true),
  );
  it('has at least eight characters and at most 1,024, with no rule of what they are', () => {
    expect(newPasswordSchema.safeParse('zvkqwpx').success).toBe(false);
    expect(newPasswordSchema.safeParse('zvkqwpxj').success).toBe(true);
    expect(newPasswordSchema.safeParse('zv kq'.repeat(200)).success).toBe(true);
    expect(newPasswordSchema.safeParse('zvkqw'.repeat(205)).success).toBe(false);
  });
  it('is not the person’s own name or address', () => {
    const person = { name: 'Edwin Marl', email: 'edwin.marl@brackenhythe.example' };
    for (const password of ['edwinmarl', 'Edwin Marl 1', 'edwin.marl@brackenhythe.example', 'edwin.marl99'])
      expect(repeatsPerson(password, person)).toBe(true);
    expect(repeatsPerson('every-peg-holds-fast', person)).toBe(false);
  });
});

describe('hashing', () => {
  it('is argon2id at the cost we chose, and tells right from wrong', async () => {
    const hash = await hashPassword('four words on a wall');
    expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect(await isPasswordRight(hash, 'four words on a wall')).toBe(true);
    expect(await isPasswordRight(hash, 'four words on a well')).toBe(false);
    expect(await isPasswordRight(undefined, 'nobody has this password')).toBe(false);
  });
  it('takes one password however a keyboard composes its letters', async () => {
    expect(
      await isPasswordRight(await hashPassword('caf\u00e9 na\u00efve owl'), 'cafe\u0301 nai\u0308ve owl'),
    ).toBe(true);
  });
});

describe('sealing', () => {
  it('opens with the same secret alone, and notices a changed letter', () => {
    fc.assert(
      fc.property(fc.string({ minLength: 1 }), fc.string({ minLength: 1 }), (secret, plain) => {
        const sealed = seal(secret, plain);
        expect(unseal(secret, sealed)).toBe(plain);
        expect(() => unseal(`${secret}x`, sealed)).toThrow();
        const bytes = Buffer.from(sealed.slice(3), 'base64url');
        bytes[bytes.length - 20] = (bytes[bytes.length - 20] ?? 0) ^ 1;
        expect(() => unseal(secret, `v1.${bytes.toString('base64url')}`)).toThrow();
      }),
      { numRuns: 50 },
    );
  });
});

describe('codes', () => {
  it('are found in this step, the last and the next', async () => {
    const secret = newSecret();
    const now = Math.floor(Date.now() / 1000);
    for (const offset of [-30, 0, 30])
      expect(await findTimeStep(secret, await generate({ secret, epoch: now + offset }))).toBe(
        Math.floor((now + offset) / 30),
      );
    expect(await findTimeStep(secret, await generate({ secret, epoch: now - 120 }))).toBeUndefined();
  });
  it('come with a picture that draws every dark square once and no other', () => {
    const { uri, picture } = describeSecret('JBSWY3DPEHPK3PXP', 'a@b.example');
    expect(uri).toBe('otpauth://totp/Treenail:a%40b.example?secret=JBSWY3DPEHPK3PXP&issuer=Treenail');
    const { size, data } = QRCode.create(uri, { errorCorrectionLevel: 'M' }).modules;
    const dark = [...data].flatMap((isDark, at) => (isDark ? [`${at % size} ${Math.floor(at / size)}`] : []));
    const drawn = [...picture.path.matchAll(/M(\d+) (\d+)h(\d+)v1h-(\d+)z/g)].flatMap(([, x, y, width]) =>
      Array.from({ length: Number(width) }, (_, step) => `${Number(x) + step} ${y}`),
    );
    expect(picture.size).toBe(size);
    expect(drawn).toEqual(dark);
  });
  it('for recovery are written as they are read: case, spaces and dashes do not matter', () => {
    for (const code of newRecoveryCodes()) {
      expect(code).toMatch(/^[a-z2-9]{4}-[a-z2-9]{4}-[a-z2-9]{4}$/);
      const typed = recoveryCodeSchema.parse({ code: ` ${code.toUpperCase().replaceAll('-', ' ')} ` }).code;
      expect(hashRecoveryCode(typed)).toBe(hashRecoveryCode(code));
    }
    expect(secondFactorSchema.parse({ code: '123 456' }).code).toBe('123456');
    for (const code of ['12345', '1234567', 'abcd', '12345a', ''])
      expect(secondFactorSchema.safeParse({ code }).success).toBe(false);
  });
});

describe('what is sent to sign in', () => {
  it.each([
    { email: ['a@b.example'], password: 'x' },
    { email: 'a@b.example' },
    { email: 'a', password: 'x' },
    { email: 'a@b.example', password: { $ne: '' } },
  ])('is refused as %j', (input) => expect(signInSchema.safeParse(input).success).toBe(false));
});

describe('where signing in leads', () => {
  it.each(['/desk', '/desk/gifts', '/desk/gifts/41?from=today', '/desk/account#password'])(
    'is the page %s that was asked for',
    (path) => {
      expect(ownPath(path)).toBe(path);
      expect(ownPath(new URLSearchParams(withNext('', path).slice(1)).get('next'))).toBe(path);
    },
  );
  it.each([
    null,
    '',
    'https://evil.example/desk',
    '//evil.example/desk',
    '/\\evil.example/desk',
    '/desk/../../evil',
    '/deskless',
    '/give',
    'javascript:alert(1)',
    '/desk/sign-in',
    '/desk/second-factor',
    '\t//evil.example',
  ])('is Today instead of %s', (path) => expect(ownPath(path)).toBe('/desk'));
});

describe('networks', () => {
  it('are one address of the short kind and a /64 of the long', () => {
    expect(networkOf('203.0.113.7')).toBe('203.0.113.7');
    expect(networkOf('::ffff:203.0.113.7')).toBe('203.0.113.7');
    expect(networkOf('2001:db8:1:2:3:4:5:6')).toBe('2001:db8:1:2');
    expect(networkOf('2001:db8::1')).toBe('2001:db8:0:0');
    expect(networkOf('::1')).toBe('0:0:0:0');
    expect(networkOf('')).toBe('');
  });
});

describe('JSON alone', () => {
  const app = express().use(requireJson, (_req, res) => void res.sendStatus(204));
  app.use(
    (error: { status: number }, _req: express.Request, res: express.Response, next: express.NextFunction) =>
      res.headersSent ? next(error) : void res.sendStatus(error.status),
  );
  it.each([
    ['POST', 'application/json', 204],
    ['POST', 'application/json; charset=utf-8', 204],
    ['POST', 'application/jsonp', 415],
    ['POST', 'text/plain', 415],
    ['PUT', '', 415],
    ['DELETE', '', 204],
    ['GET', '', 204],
  ])('%s of "%s" is answered %i', async (method, type, status) => {
    const asked = {
      GET: supertest(app).get('/'),
      POST: supertest(app).post('/'),
      PUT: supertest(app).put('/'),
      DELETE: supertest(app).delete('/'),
    }[method];
    if (!asked) throw new Error(`no ${method}`);
    if (type !== '') void asked.set('Content-Type', type);
    expect((await (method === 'GET' ? asked : asked.send(type === '' ? undefined : '{}'))).status).toBe(
      status,
    );
  });
});
