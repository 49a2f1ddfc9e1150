import { hash, verify } from '@node-rs/argon2';

/** argon2id parameters: OWASP Password Storage Cheat Sheet, "Argon2id", second of the equivalent settings (m = 19 MiB, t = 2, p = 1). */
const parameters = { memoryCost: 19_456, timeCost: 2, parallelism: 1 } as const;

export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), parameters);

let decoy: Promise<string> | undefined;

/** Checks a password; with no stored hash it does the same work and answers no, so that time tells nothing about accounts. */
export async function verifyPassword(stored: string | null, password: string): Promise<boolean> {
  decoy ??= hashPassword('not a password of anybody');
  const matches = await verify(stored ?? (await decoy), password.normalize('NFKC'));
  return stored !== null && matches;
}
