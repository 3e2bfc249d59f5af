import { compare, hash, truncates } from 'bcryptjs';
import { notValid } from '../errors';

/** Work factor of new hashes: about an eighth of a second each on an ordinary machine. */
export const PASSWORD_COST = 11;

/** The hash of a password nobody has: compared against where there is no account, so that the answer takes as long. */
const NOBODYS_HASH = '$2b$11$MoLC7YOuWySM88VIipm07eoHGx48HvVjvTaW7AM7jfEjxxjqO9Eam';

/** Only 72 bytes of a password count in the hash; a longer one is refused rather than cut in silence. */
export async function hashPassword(password: string): Promise<string> {
  if (truncates(password))
    throw notValid(
      'The new password is longer than 72 bytes, of which no more would count. Choose a shorter one.',
      [{ path: 'password', message: 'longer than 72 bytes' }],
    );
  return hash(password, PASSWORD_COST);
}

/** Whether the password belongs to the hash. Takes equally long where there is no hash. */
export async function passwordMatches(password: string, passwordHash: string | null): Promise<boolean> {
  const same = await compare(password, passwordHash ?? NOBODYS_HASH);
  return same && passwordHash !== null && !truncates(password);
}
