import type { Me } from '~/lib/contracts/auth';
import type { Actor } from '../auth/actor';
import { hashPassword, passwordMatches } from '../auth/password';
import { inTransaction } from '../database';
import { HoldfastError, notAllowed, notFound, notValid } from '../errors';
import {
  findAccount,
  findPasswordHash,
  savePasswordHash,
  updateUser,
  type AccountChange,
} from '../repositories/accounts';
import { recordEvent } from '../repositories/audit';
import { findLiveSession } from '../repositories/sessions';
import { beginSession, endOtherSessions } from './sessions';
import { countAttempt } from './throttle';

/** What the service needs to know of the browser that signs in. */
export interface Visitor {
  readonly address: string;
  readonly userAgent: string | null;
  /** Whether this browser has signed in to that account before. */
  knowsAccount(userId: string): Promise<boolean>;
}

/** Checks an address and a password and begins a session. The answer for an address without account takes as long. */
export async function signIn(
  email: string,
  password: string,
  visitor: Visitor,
): Promise<{ sessionId: string; me: Me }> {
  const account = await findAccount(email);
  const known = account !== null && (await visitor.knowsAccount(account.userId));
  const attempt = await countAttempt(email, visitor.address, known);
  const right = await passwordMatches(password, account?.passwordHash ?? null);
  if (!account || !right)
    throw new HoldfastError('wrong-credentials', 'This address and password do not belong together.');
  const { userId, studioId } = account;
  if (!studioId)
    throw notAllowed('This account belongs to no studio any more. Ask the owner of your studio.');
  const sessionId = await inTransaction(async (tx) => {
    await attempt.succeeded(tx);
    return beginSession(tx, { userId, studioId }, visitor.userAgent);
  });
  return { sessionId, me: await meOf(sessionId) };
}

export async function meOf(sessionId: string): Promise<Me> {
  const session = await findLiveSession(sessionId);
  if (!session) throw notFound('session');
  return session.me;
}

/** Changes the person's own name, units or theme. */
export async function updateAccount(actor: Actor, change: AccountChange): Promise<Me> {
  await inTransaction((tx) => updateUser(tx, actor.userId, change));
  return meOf(actor.sessionId);
}

/** Changes the person's own password; every other session of theirs ends. */
export async function changePassword(
  actor: Actor,
  currentPassword: string,
  newPassword: string,
  address: string,
): Promise<void> {
  const attempt = await countAttempt(`change of ${actor.userId}`, address, false);
  const right = await passwordMatches(currentPassword, await findPasswordHash(actor.userId));
  if (!right)
    throw notValid('The current password is not right.', [{ path: 'currentPassword', message: 'not right' }]);
  const passwordHash = await hashPassword(newPassword);
  await inTransaction(async (tx) => {
    await attempt.succeeded(tx);
    await savePasswordHash(tx, actor.userId, passwordHash);
    await endOtherSessions(tx, actor);
    const who = { studioId: actor.studioId, actorId: actor.userId };
    await recordEvent(tx, who, 'changed-password', 'user', actor.userId);
  });
}
