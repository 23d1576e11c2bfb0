import { hash, verify } from '@node-rs/argon2';

/** Argon2id with the package's defaults (m = 19 MiB, t = 2, p = 1), the salt inside the hash. */
export function hashPassword(password: string): Promise<string> {
  return hash(comparable(password));
}

/**
 * Whether the password is the right one. Without a hash, because the address is not known, the same work is done on
 * the hash of nothing: the time says no more than the answer.
 */
export async function isRightPassword(password: string, passwordHash: string | null): Promise<boolean> {
  const isRight = await verify(passwordHash ?? (await hashOfNobody()), comparable(password));
  return isRight && passwordHash !== null;
}

/** One keyboard composes an accented letter, another sends its parts: both are the same password. */
function comparable(password: string): string {
  return password.normalize('NFKC');
}

let nobody: Promise<string> | undefined;

function hashOfNobody(): Promise<string> {
  nobody ??= hash('the password of nobody');
  return nobody;
}
