import { randomUUID } from 'node:crypto';
import { vi } from 'vitest';
import { kilnInputSchema } from '~/lib/contracts/equipment';
import type { Version } from '~/lib/contracts/profiles';
import type { ProfileInput } from '~/lib/profile/schema';
import { profileSchema } from '~/lib/profile/schema';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';
import type { Role } from '~/lib/contracts/common';
import type { Actor } from '~/lib/server/auth/actor';
import { database } from '~/lib/server/database';
import { HoldfastError } from '~/lib/server/errors';
import { approveVersion, createProfile, submitVersion } from '~/lib/server/services/profiles';
import type { TestDatabase } from './database';

/** A front loader that can do what {@link FIRING} asks. */
export const KILN = {
  name: 'Tall kiln',
  energy: 'electric',
  innerWidthM: 0.45,
  innerDepthM: 0.45,
  innerHeightM: 0.6,
  lining: 'brick-and-fibre',
  liningM: 0.15,
  ratedKW: 12,
  maxC: 1280,
} as const;
export const kilnInput = (fields: object = {}) => kilnInputSchema.parse({ ...KILN, ...fields });

/** A slow firing of an empty shell, well within what the kiln above can do. */
export const FIRING: ProfileInput = {
  startC: 20,
  segments: [
    { stage: 'drying', toC: 105, rateCPerH: 40, holdS: 7200, vent: 'open' },
    { stage: 'vitrification', toC: 870, rateCPerH: 100, holdS: 7200 },
    { stage: 'cooling', toC: 100, rateCPerH: 'coast', holdS: 0 },
  ],
};
export const firing = (fields: Partial<ProfileInput> = {}) => profileSchema.parse({ ...FIRING, ...fields });

export const SHELLS: LoadInput = {
  moulds: [{ material: 'fused-silica-shell', count: 2, massKg: 2, wallM: 0.008 }],
};
export const load = (fields: LoadInput = SHELLS) => loadSchema.parse(fields);

/** One more person of a studio, made past the application. */
export async function addPerson(
  db: TestDatabase,
  studioId: string,
  name: string,
  ...roles: Role[]
): Promise<Actor> {
  const userId = randomUUID();
  await db.query('insert into users (id, name, email) values ($1, $2, $3)', [
    userId,
    name,
    `${userId}@example.test`,
  ]);
  await db.query('insert into memberships (studio_id, user_id, roles) values ($1, $2, $3)', [
    studioId,
    userId,
    roles,
  ]);
  return { userId, studioId, roles, sessionId: userId };
}

/** How a service refused, by the HTTP status it has outside; fails if it did not refuse. */
export async function refusal(work: Promise<unknown>): Promise<HoldfastError> {
  try {
    await work;
  } catch (error) {
    if (error instanceof HoldfastError) return error;
    throw error;
  }
  throw new Error('it was not refused');
}

export const statusOf = async (work: Promise<unknown>): Promise<number> => (await refusal(work)).status;

/** How many statements some work sends to the database. */
export async function statementsOf(work: () => Promise<unknown>): Promise<number> {
  const query = vi.spyOn(database(), 'query');
  try {
    await work();
    return query.mock.calls.length;
  } finally {
    query.mockRestore();
  }
}

/** An approved version of a technician's, for a kiln. */
export async function approvedVersion(
  people: TestDatabase['people'],
  kilnId: string,
  name = 'Approved shell',
): Promise<{ profileId: string; version: Version }> {
  const { id } = await createProfile(people.tech.actor, {
    name,
    kilnId,
    profile: firing(),
    load: load(),
  });
  await submitVersion(people.tech.actor, id, 1, {});
  const version = await approveVersion(people.teacher.actor, id, 1, { overrides: [] });
  return { profileId: id, version };
}
