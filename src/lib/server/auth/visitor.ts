import type { APIContext } from 'astro';
import type { Visitor } from '../services/accounts';
import { knowsAccount, rememberAccount, writeSession } from './session-cookie';

type Browser = Pick<APIContext, 'clientAddress' | 'request' | 'cookies'>;

/** What the accounts service asks about the browser behind a request. */
export const visitorOf = (context: Browser): Visitor => ({
  address: context.clientAddress,
  userAgent: context.request.headers.get('user-agent'),
  knowsAccount: (userId) => knowsAccount(context.cookies, userId),
});

/** Hands the browser its session, and lets it be known again for that account. */
export async function admit(
  context: Pick<APIContext, 'cookies'>,
  sessionId: string,
  userId: string,
): Promise<void> {
  await writeSession(context.cookies, sessionId);
  await rememberAccount(context.cookies, userId);
}
