import { randomBytes, scrypt, timingSafeEqual } from 'node:crypto';

/**
 * Who somebody is: sign-in, sessions and the actor a request stands for. What they may do is not
 * decided here but in `lib/policy`.
 *
 * This file: scrypt at N = 2^17, r = 8, p = 1 (the sign-in library's own default, N = 2^14, is below
 * the advice of 2025). One hash takes 128 MiB, so at most two run at once; others wait their turn.
 */
const COST = { log2N: 17, r: 8, p: 1 } as const;
const KEY_BYTES = 32;
const AT_ONCE = 2;

let running = 0;
const waiting: (() => void)[] = [];

async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) await new Promise<void>((go) => waiting.push(go));
  else running++;
  try {
    return await work();
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running--;
  }
}

const derive = (password: string, salt: Buffer, cost: { log2N: number; r: number; p: number }): Promise<Buffer> =>
  inTurn(
    () =>
      new Promise((resolve, reject) => {
        const options = { N: 2 ** cost.log2N, r: cost.r, p: cost.p, maxmem: 256 * 2 ** cost.log2N * cost.r };
        scrypt(password.normalize('NFKC'), salt, KEY_BYTES, options, (error, key) => (error ? reject(error) : resolve(key)));
      }),
  );

/** `scrypt$17$8$1$salt$key`: the cost travels with the hash, so that it can be raised later. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(16);
  const key = await derive(password, salt, COST);
  return ['scrypt', COST.log2N, COST.r, COST.p, salt.toString('base64url'), key.toString('base64url')].join('$');
}

export async function verifyPassword({ hash, password }: { hash: string; password: string }): Promise<boolean> {
  const [kind, log2N, r, p, salt, key] = hash.split('$');
  if (kind !== 'scrypt' || !salt || !key) return false;
  const cost = { log2N: Number(log2N), r: Number(r), p: Number(p) };
  if (!(cost.log2N <= 20 && cost.r <= 16 && cost.p <= 4)) return false;
  const expected = Buffer.from(key, 'base64url');
  const derived = await derive(password, Buffer.from(salt, 'base64url'), cost);
  return derived.length === expected.length && timingSafeEqual(derived, expected);
}

/** For the test that counts. */
export const hashesRunning = (): number => running;
