import 'server-only';
import { hash, verify } from '@node-rs/argon2';

/** Argon2id (the package's default kind) at 46 MiB, two passes: above the floor of the OWASP password storage sheet (19 MiB, two passes). */
const COST = { memoryCost: 46 * 1024, timeCost: 2, parallelism: 1 };

const prepared = (password: string) => password.normalize('NFKC');

export const hashPassword = (password: string): Promise<string> => hash(prepared(password), COST);

let dummy: Promise<string> | undefined;

/** Takes the same time for an unknown account as for a known one. */
export async function passwordMatches(stored: string | null, password: string): Promise<boolean> {
  dummy ??= hashPassword('no account has this password');
  const matches = await verify(stored ?? (await dummy), prepared(password));
  return stored !== null && matches;
}
