import type { Me } from '~/lib/contracts/auth';
import type { Units } from '~/lib/contracts/common';
import type { z } from '~/lib/zod';
import { hasRole, isOnlyStudent, type Actor } from '../auth/actor';
import { HoldfastError } from '../errors';

/** Who looks at a page, and how the page is to speak: in which units and which time zone. */
export interface Visitor {
  readonly actor: Actor;
  readonly me: Me;
  readonly units: Units;
  readonly timeZone: string;
  /** May add and change kilns, thermocouples, furnaces and tariffs. */
  readonly keepsEquipment: boolean;
  readonly teaches: boolean;
  readonly isStudent: boolean;
  readonly isTechnician: boolean;
}

/** The person of a page that needs one; the middleware has let nobody else in. */
export function visitor(locals: App.Locals): Visitor {
  const { actor, me } = locals;
  if (!actor || !me) throw new HoldfastError('not-signed-in', 'Sign in to go on.');
  return {
    actor,
    me,
    units: me.preferences.units ?? me.studio.units,
    timeZone: me.studio.timeZone,
    keepsEquipment: hasRole(actor, 'technician', 'owner'),
    teaches: hasRole(actor, 'teacher', 'owner'),
    isStudent: isOnlyStudent(actor),
    isTechnician: hasRole(actor, 'technician'),
  };
}

/** Query of a list in a page's address; each part that the list does not know, or cannot read, is left aside. */
export function queryOf<S extends z.ZodObject<z.ZodRawShape>>(schema: S, url: URL): z.output<S> {
  const shape = schema.shape as Record<string, z.ZodType>;
  const readable = [...url.searchParams].filter(
    ([name, value]) => value !== '' && Object.hasOwn(shape, name) && shape[name]?.safeParse(value).success,
  );
  return schema.parse(Object.fromEntries(readable));
}

/** A path of this site from `?next=`; whatever could lead elsewhere leads to the first page. */
export function ownPath(text: string | null): string {
  return text !== null && /^\/(?![/\\])[\x21-\x7e]{0,2000}$/.test(text) ? text : '/';
}
