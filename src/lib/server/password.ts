import { hash, verify } from '@node-rs/argon2';
import { Refusal } from './refusal.ts';

/** argon2id, m = 19 MiB, t = 3, p = 1: above the least that the OWASP password storage sheet asks for. */
const OPTIONS = { memoryCost: 19_456, timeCost: 3, parallelism: 1 };
const AT_ONCE = 2;
const MAX_WAITING = 40;

let running = 0;
const waiting: (() => void)[] = [];

/** At most two hashes at a time: more would take the processors from everybody else. */
async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) {
    if (waiting.length >= MAX_WAITING)
      throw new Refusal('busy', 'Too many people sign in at this moment. Try again shortly.', {}, 5);
    await new Promise<void>((resolve) => waiting.push(resolve));
  }
  running++;
  try {
    return await work();
  } finally {
    running--;
    waiting.shift()?.();
  }
}

export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(password, OPTIONS));

/** A hash of nothing anybody knows: an unknown account takes as long as a wrong password. */
let decoy: Promise<string> | null = null;

export async function passwordMatches(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword(`decoy ${Math.random()}`);
  const against = stored ?? (await decoy);
  const matches = await inTurn(() => verify(against, password));
  return matches && stored !== null;
}

/** Whether a stored hash was made with weaker settings than today's. */
export const needsRehash = (stored: string): boolean =>
  !stored.startsWith(`$argon2id$v=19$m=${OPTIONS.memoryCost},t=${OPTIONS.timeCost},p=${OPTIONS.parallelism}$`);

/** Passwords that everybody tries first; long ones need not be here. */
const COMMON = new Set(
  (
    'password password1 password12 password123 passw0rd 12345678 123456789 1234567890 qwertyui qwertyuiop qwerty123 11111111 00000000 ' +
    'iloveyou sunshine princess football baseball trustno1 superman letmein1 welcome1 abcd1234 1q2w3e4r 1qaz2wsx asdfghjk zaq12wsx ' +
    'feynman1 lagrange lagrangian wickwork'
  ).split(' '),
);

/** A sentence about what is wrong with a new password, or null. Long is good; nothing else is asked. */
export function passwordProblem(password: string, email: string): string | null {
  if (password.length < 8) return 'Use at least 8 characters.';
  if (Buffer.byteLength(password) > 1_024) return 'Use at most 1 024 bytes.';
  const lower = password.toLowerCase();
  if (COMMON.has(lower) || new Set(lower).size < 3)
    return 'This password is among the first ones that are tried. Choose another.';
  if (lower === email.toLowerCase()) return 'The password must not be your e-mail address.';
  return null;
}
