// What the desk and the API say to each other about who is signed in and how they prove it.
import { z } from 'zod';
import { roleSchema } from '../roles.ts';
import { MAX_PASSWORD_LENGTH, newPasswordSchema } from './password-rules.ts';

export const SESSION_STEPS = ['signed-out', 'second-factor', 'second-factor-setup', 'signed-in'] as const;
export const sessionStepSchema = z.enum(SESSION_STEPS);
export type SessionStep = z.infer<typeof sessionStepSchema>;

export const personSchema = z.object({
  name: z.string(),
  email: z.string(),
  roles: z.array(roleSchema),
  isTrustee: z.boolean(),
});
export type Person = z.infer<typeof personSchema>;

/** `token` goes back in the header below with every request that changes something. */
export const sessionSchema = z.object({
  person: personSchema.nullable(),
  step: sessionStepSchema,
  token: z.string().nullable(),
});
export type Session = z.infer<typeof sessionSchema>;
export { TOKEN_HEADER } from './token-header.ts';

export const SIGNED_OUT: Session = { person: null, step: 'signed-out', token: null };

const presentPassword = z
  .string('Write your password.')
  .min(1, 'Write your password.')
  .max(MAX_PASSWORD_LENGTH, `A password has at most ${MAX_PASSWORD_LENGTH} characters.`);

export const signInSchema = z.strictObject({
  email: z
    .string('Write the e-mail address you sign in with.')
    .trim()
    .max(254, 'An e-mail address has at most 254 characters.')
    .pipe(z.email('Write your e-mail address in full, such as name@brackenhythe.example.')),
  password: presentPassword,
});
export type SignInForm = z.infer<typeof signInSchema>;

// Codes are read off a small screen or a sheet of paper: spaces, dashes and capitals never matter.
const bareCode = z
  .string('Write the code.')
  .max(64, 'That is too long for a code.')
  .transform((typed) => typed.toLowerCase().replaceAll(/[\s-]/g, ''));

const ONE_TIME_CODE = /^\d{6}$/;
const RECOVERY_CODE = /^[a-z2-9]{12}$/;
export const isOneTimeCode = (code: string): boolean => ONE_TIME_CODE.test(code);

const oneTimeCode = bareCode.pipe(
  z.string().regex(ONE_TIME_CODE, 'Write the six figures that your app shows now.'),
);

export const oneTimeCodeSchema = z.strictObject({ code: oneTimeCode });
export const recoveryCodeSchema = z.strictObject({
  code: bareCode.pipe(
    z
      .string()
      .regex(RECOVERY_CODE, 'Write one recovery code as it stands on your list: three groups of four.'),
  ),
});

/** Either kind of code proves the second factor. */
export const secondFactorSchema = z.strictObject({
  code: bareCode.refine(
    (code) => ONE_TIME_CODE.test(code) || RECOVERY_CODE.test(code),
    'Write the six figures that your app shows now, or one of your recovery codes.',
  ),
});

/** Somebody already signed in proves again who they are before a second factor is put in or changed. */
export const beginSecondFactorSchema = z.strictObject({
  password: presentPassword.optional(),
  code: oneTimeCode.optional(),
});

export const secondFactorOfferSchema = z.object({
  secret: z.string(),
  uri: z.string(),
  /** The picture to scan: a square of `size` by `size`, its dark squares as the path of a drawing. */
  picture: z.object({ size: z.int(), path: z.string() }),
  session: sessionSchema,
});
export type SecondFactorOffer = z.infer<typeof secondFactorOfferSchema>;

export const recoveryCodesSchema = z.object({ recoveryCodes: z.array(z.string()) });
export const secondFactorKeptSchema = z.object({
  session: sessionSchema,
  recoveryCodes: z.array(z.string()),
});

export const accountSchema = personSchema.extend({
  secondFactor: z.object({
    isOn: z.boolean(),
    isNeeded: z.boolean(),
    since: z.iso.datetime().nullable(),
    recoveryCodesLeft: z.int(),
  }),
});
export type Account = z.infer<typeof accountSchema>;

export const changePasswordSchema = z.strictObject({
  password: presentPassword,
  newPassword: newPasswordSchema,
});
export type ChangePasswordForm = z.infer<typeof changePasswordSchema>;
