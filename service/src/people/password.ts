import { randomBytes, scrypt, timingSafeEqual, type ScryptOptions } from 'node:crypto';
import pLimit from 'p-limit';

/** scrypt N=2^17, r=8, p=1: OWASP Password Storage Cheat Sheet (2026), the choice where Argon2id is not at hand. */
const cost: ScryptOptions = { N: 2 ** 17, r: 8, p: 1, maxmem: 256 * 1024 * 1024 };
const keyBytes = 32;

// One hash takes 128 MiB, so few run at a time; they run in libuv's threads, off the event loop.
const limit = pLimit(2);

function derive(password: string, salt: Buffer): Promise<Buffer> {
  return limit(
    () =>
      new Promise<Buffer>((resolve, reject) => {
        scrypt(password.normalize('NFKC'), salt, keyBytes, cost, (error, key) =>
          error ? reject(error) : resolve(key),
        );
      }),
  );
}

/** `scrypt$N$r$p$salt$key`, salt and key in base64. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(16);
  const key = await derive(password, salt);
  return ['scrypt', cost.N, cost.r, cost.p, salt.toString('base64'), key.toString('base64')].join('$');
}

// Verified in place of a missing hash, so that an unknown person takes as long as a wrong password.
const nobody = `scrypt$${cost.N}$${cost.r}$${cost.p}$${randomBytes(16).toString('base64')}$${randomBytes(keyBytes).toString('base64')}`;

export async function verifyPassword(password: string, hash: string | null): Promise<boolean> {
  const [, , , , salt, key] = (hash ?? nobody).split('$');
  const derived = await derive(password, Buffer.from(salt, 'base64'));
  return timingSafeEqual(derived, Buffer.from(key, 'base64')) && hash !== null;
}
