/** argon2id, with the parameters of the OWASP Password Storage Cheat Sheet (19 MiB, 2 passes, 1 lane). */
import 'server-only';
import { Algorithm, hash, verify } from '@node-rs/argon2';

const PARAMETERS = {
  algorithm: 2 satisfies Algorithm.Argon2id,
  memoryCost: 19_456,
  timeCost: 2,
  parallelism: 1,
} as const;

export const SHORTEST_PASSWORD = 12;
export const LONGEST_PASSWORD = 128;

export const hashPassword = (password: string): Promise<string> => hash(password, PARAMETERS);

let decoy: Promise<string> | null = null;

/** False also where there is no hash; it takes as long either way, so that nobody learns which addresses have an account. */
export async function passwordFits(password: string, storedHash: string | null): Promise<boolean> {
  decoy ??= hashPassword('no account has this password');
  const fits = await verify(storedHash ?? (await decoy), password.slice(0, LONGEST_PASSWORD)).catch(() => false);
  return fits && storedHash !== null;
}
