import type { Role } from '~/lib/contracts/common';
import { notAllowed } from '../errors';

/** Who is acting, in which studio, as resolved from the session by the middleware. Services take it first. */
export interface Actor {
  readonly userId: string;
  readonly studioId: string;
  readonly roles: readonly Role[];
  readonly sessionId: string;
}

export const hasRole = (actor: Actor, ...roles: readonly Role[]): boolean =>
  roles.some((role) => actor.roles.includes(role));

/** Someone who holds no role but student (or none): sees only what handouts and own work give. */
export const isOnlyStudent = (actor: Actor): boolean => !hasRole(actor, 'owner', 'technician', 'teacher');

/** Throws 403 unless the actor has one of the roles. */
export function requireRole(actor: Actor, ...roles: readonly Role[]): void {
  if (!hasRole(actor, ...roles)) throw notAllowed(`This needs the role ${roles.join(' or ')}.`);
}
