import type { AstroCookies } from 'astro';
import { jwtVerify, SignJWT } from 'jose';
import { z } from '~/lib/zod';
import { config } from '../config';

/** Longest life of a session, however much it is used; the cookie lives as long, the database decides. */
export const SESSION_MAX_AGE_S = 90 * 24 * 3600;
/** A browser that has signed in before is remembered for its own throttle for a year. */
const DEVICE_MAX_AGE_S = 365 * 24 * 3600;

type Kind = 'session' | 'device';

const key = () => new TextEncoder().encode(config().secret);

/** In production the prefix binds the cookie to this host, over TLS, with no other path. */
export const cookieName = (kind: Kind): string =>
  config().mode === 'production' ? `__Host-holdfast_${kind}` : `holdfast_${kind}`;

async function sign(kind: Kind, subject: string): Promise<string> {
  return new SignJWT({})
    .setProtectedHeader({ alg: 'HS256' })
    .setAudience(kind)
    .setSubject(subject)
    .setIssuedAt()
    .sign(key());
}

/** What the signed cookie names, or null where it is missing, forged, or signed with another secret. */
async function read(cookies: AstroCookies, kind: Kind): Promise<string | null> {
  const token = cookies.get(cookieName(kind))?.value;
  if (!token || token.length > 1000) return null;
  try {
    const { payload } = await jwtVerify(token, key(), { algorithms: ['HS256'], audience: kind });
    return payload.sub ?? null;
  } catch {
    return null;
  }
}

async function write(cookies: AstroCookies, kind: Kind, subject: string, maxAge: number): Promise<void> {
  cookies.set(cookieName(kind), await sign(kind, subject), {
    httpOnly: true,
    sameSite: 'lax',
    path: '/',
    secure: config().mode === 'production',
    maxAge,
  });
}

export async function readSessionId(cookies: AstroCookies): Promise<string | null> {
  const id = await read(cookies, 'session');
  return z.uuid().safeParse(id).success ? id : null;
}

export const writeSession = (cookies: AstroCookies, sessionId: string): Promise<void> =>
  write(cookies, 'session', sessionId, SESSION_MAX_AGE_S);

export function clearSession(cookies: AstroCookies): void {
  cookies.delete(cookieName('session'), {
    path: '/',
    secure: config().mode === 'production',
    httpOnly: true,
  });
}

/** Whether this browser has signed in to that account before. */
export const knowsAccount = async (cookies: AstroCookies, userId: string): Promise<boolean> =>
  (await read(cookies, 'device')) === userId;

export const rememberAccount = (cookies: AstroCookies, userId: string): Promise<void> =>
  write(cookies, 'device', userId, DEVICE_MAX_AGE_S);
