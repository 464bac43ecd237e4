// Hashes and checks passwords: argon2id, a few at a time, and as slowly for strangers as for people we know.
import { hash, verify } from '@node-rs/argon2';
import { TooMany } from '#server/platform/errors.ts';

const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };
// Each hash holds 19 MiB and a thread: without a cap, a burst of sign-ins would take the machine from the givers.
const AT_ONCE = 2;
const MAX_WAITING = 64;

let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) {
    if (waiting.length >= MAX_WAITING) throw new TooMany(5);
    await new Promise<void>((resolve) => waiting.push(resolve));
  } else running += 1;
  try {
    return await work();
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}

// One password typed on two keyboards may come as different code points.
const normal = (password: string): string => password.normalize('NFKC');

export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(normal(password), COST));

let dummy: Promise<string> | undefined;

/** An unknown address costs the same time as a known one, so that nobody learns who has an account. */
export async function isPasswordRight(passwordHash: string | undefined, password: string): Promise<boolean> {
  dummy ??= hashPassword('nobody has this password');
  const isRight = await checkHash(passwordHash ?? (await dummy), password);
  return isRight && passwordHash !== undefined;
}

const checkHash = (passwordHash: string, password: string): Promise<boolean> =>
  inTurn(() => verify(passwordHash, normal(password)));
