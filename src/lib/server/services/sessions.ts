import type { z } from '~/lib/zod';
import type { Me, sessionSchema } from '~/lib/contracts/auth';
import type { Actor } from '../auth/actor';
import { SESSION_MAX_AGE_S } from '../auth/session-cookie';
import { inTransaction, type Tx } from '../database';
import { notFound } from '../errors';
import { recordEvent } from '../repositories/audit';
import {
  deleteExpiredSessions,
  deleteOtherSessions,
  deleteSession,
  findLiveSession,
  insertSession,
  listSessions,
  touchSession,
  type LiveSession,
} from '../repositories/sessions';

/** A session nobody uses for this long ends. */
const IDLE_S = 14 * 24 * 3600;
/** Being seen is written down at most this often. */
const TOUCH_S = 60;

export type SessionItem = z.input<typeof sessionSchema>;

/** Begins a session and clears away those of the person that have run out. */
export async function beginSession(
  tx: Tx,
  person: { userId: string; studioId: string },
  userAgent: string | null,
): Promise<string> {
  const now = new Date();
  await deleteExpiredSessions(tx, person.userId, now);
  const expiresAt = expiryOf(now, now);
  const id = await insertSession(tx, { ...person, device: deviceOf(userAgent), expiresAt });
  await recordEvent(tx, { ...person, actorId: person.userId }, 'signed-in', 'session', id);
  return id;
}

/** Who the session stands for, or null once it has ended. Use moves its end on, up to the longest life of a session. */
export async function resolveSession(id: string): Promise<{ actor: Actor; me: Me } | null> {
  const session = await findLiveSession(id);
  if (!session) return null;
  const now = new Date();
  if (now.getTime() - session.lastSeenAt.getTime() > TOUCH_S * 1000)
    await touchSession(id, now, expiryOf(session.createdAt, now));
  return { actor: actorOf(session), me: session.me };
}

const actorOf = (session: LiveSession): Actor => ({
  userId: session.userId,
  studioId: session.studioId,
  roles: session.roles,
  sessionId: session.id,
});

const expiryOf = (createdAt: Date, seenAt: Date): Date =>
  new Date(Math.min(seenAt.getTime() + IDLE_S * 1000, createdAt.getTime() + SESSION_MAX_AGE_S * 1000));

export async function ownSessions(actor: Actor): Promise<SessionItem[]> {
  const rows = await listSessions(actor.userId, new Date());
  return rows.map((row) => ({
    id: row.id,
    createdAt: row.createdAt.toISOString(),
    lastSeenAt: row.lastSeenAt.toISOString(),
    device: row.device,
    current: row.id === actor.sessionId,
  }));
}

export async function endSession(actor: Actor, id: string): Promise<void> {
  await inTransaction(async (tx) => {
    if ((await deleteSession(tx, actor.userId, id)) === 0) throw notFound('session');
    await recordEvent(tx, { studioId: actor.studioId, actorId: actor.userId }, 'ended', 'session', id);
  });
}

export async function endOtherSessions(tx: Tx, actor: Actor): Promise<void> {
  await deleteOtherSessions(tx, actor.userId, actor.sessionId);
}

const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdg\//, 'Edge'],
  [/\bFirefox\//, 'Firefox'],
  [/\bChrom(e|ium)\//, 'Chrome or Chromium'],
  [/\bSafari\//, 'Safari'],
];
const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/\b(iPhone|iPad)\b/, 'iOS'],
  [/\bAndroid\b/, 'Android'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b/, 'macOS'],
  [/\bLinux\b/, 'Linux'],
];

/** A few words by which a person knows their own browser again; never the whole of what it said. */
export function deviceOf(userAgent: string | null): string {
  const named = (table: readonly (readonly [RegExp, string])[]) =>
    table.find(([pattern]) => pattern.test(userAgent ?? ''))?.[1];
  const browser = named(BROWSERS);
  const system = named(SYSTEMS);
  if (!browser) return system ? `Another program on ${system}` : 'Another program';
  return system ? `${browser} on ${system}` : browser;
}
