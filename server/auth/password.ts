import { hash, verify } from '@node-rs/argon2';

/** argon2id at the floor that OWASP's password storage cheat sheet gives: 19 MiB, 2 rounds, 1 lane (from memory). */
const cost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string): Promise<string> => hash(password, cost);

let nobody: Promise<string> | undefined;

/**
 * Whether a password fits. Without a person the same work is done on a dummy, so that the time of the answer does
 * not tell who has an account.
 */
export async function checkPassword(digest: string | null, password: string): Promise<boolean> {
  nobody ??= hashPassword('nobody has this password');
  const fits = await verify(digest ?? (await nobody), password);
  return digest !== null && fits;
}
