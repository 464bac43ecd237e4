// The present code of each person who has a second factor, by the real clock, as a phone would reckon it.
import { generate } from 'otplib';

const STEP_SECONDS = 30;

type Person = { name: string; email: string; roles: readonly string[]; totpSecret?: string };
export type PersonCode = { name: string; email: string; roles: string; code: string };

export const secondsLeft = (now: Date): number =>
  STEP_SECONDS - (Math.floor(now.getTime() / 1000) % STEP_SECONDS);

export async function readCodes(people: readonly Person[], now: Date): Promise<PersonCode[]> {
  const epoch = Math.floor(now.getTime() / 1000);
  return Promise.all(
    people.flatMap(({ name, email, roles, totpSecret }) =>
      totpSecret
        ? [
            generate({ secret: totpSecret, epoch }).then((code) => ({
              name,
              email,
              roles: roles.join(', '),
              code,
            })),
          ]
        : [],
    ),
  );
}
