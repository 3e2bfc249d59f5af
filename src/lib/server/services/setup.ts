import { createHash } from 'node:crypto';
import type { Me } from '~/lib/contracts/auth';
import { hashPassword } from '../auth/password';
import { inTransaction } from '../database';
import { notFound, notValid, wrongState } from '../errors';
import { anOwnerExists, insertPerson, insertStudio } from '../repositories/accounts';
import { recordEvent } from '../repositories/audit';
import { lockSetupToken, markSetupTokenUsed } from '../repositories/setup-tokens';
import { meOf } from './accounts';
import { beginSession } from './sessions';

export interface FirstOwner {
  readonly token: string;
  readonly studioName: string;
  readonly timeZone: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** Makes the first studio and its owner with the one-time link that the start printed, and signs them in. */
export async function setUp(
  owner: FirstOwner,
  userAgent: string | null,
): Promise<{ sessionId: string; me: Me }> {
  if (!isTimeZone(owner.timeZone))
    throw notValid(`'${owner.timeZone}' is not a time zone. Expected a name such as Europe/London.`, [
      { path: 'timeZone', message: 'not a time zone' },
    ]);
  const passwordHash = await hashPassword(owner.password);
  const tokenHash = createHash('sha256').update(owner.token).digest('hex');
  const sessionId = await inTransaction(async (tx) => {
    const now = new Date();
    const token = await lockSetupToken(tx, tokenHash);
    if (!token || token.expiresAt <= now) throw notFound('set-up link');
    if (token.usedAt || (await anOwnerExists(tx)))
      throw wrongState('This installation has its first owner already. Sign in, or ask them to invite you.');
    await markSetupTokenUsed(tx, tokenHash, now);
    const studioId = await insertStudio(tx, { name: owner.studioName, timeZone: owner.timeZone });
    const { name, email } = owner;
    const userId = await insertPerson(tx, { studioId, name, email, roles: ['owner'], passwordHash });
    if (!userId) throw wrongState('This address has an account already.');
    await recordEvent(tx, { studioId, actorId: userId }, 'set-up', 'studio', studioId);
    return beginSession(tx, { userId, studioId }, userAgent);
  });
  return { sessionId, me: await meOf(sessionId) };
}

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name }).format();
    return true;
  } catch {
    return false;
  }
}
