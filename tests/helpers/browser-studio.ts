import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from '../../db/up/root.mjs';
import type { ProfileInput } from '~/lib/profile/schema';
import type { LoadInput } from '~/lib/thermal/load-schema';
import type { TestApp } from './app';
import { BODIES } from './world';

interface Made {
  readonly id: string;
}
export interface Draft {
  readonly kilnId: string;
  readonly profileId: string;
  readonly versionId: string;
  /** Its page. */
  readonly path: string;
}

const madeOf = (answer: { status: number; text: string; body: unknown }): Made => {
  if (answer.status !== 201) throw new Error(`${answer.status} ${answer.text.slice(0, 400)}`);
  return answer.body as Made;
};

export const SHELLS: LoadInput = {
  moulds: [{ material: 'fused-silica-shell', count: 2, massKg: 2, wallM: 0.008 }],
};

/** A draft of the technician's, with a kiln of its own, made by the interface so that a test can begin at its page. */
export async function aDraft(
  app: TestApp,
  fields: { name?: string; profile?: ProfileInput; load?: LoadInput; kiln?: object } = {},
): Promise<Draft> {
  const tech = await app.as('tech');
  const kilnId = madeOf(await tech.post('/api/kilns', { ...BODIES.kiln, ...fields.kiln })).id;
  const { name = 'Shell', profile = BODIES.profile, load = SHELLS } = fields;
  const made = madeOf(await tech.post('/api/profiles', { name, kilnId, profile, load })) as Made & {
    version: Made;
  };
  const path = `/profiles/${made.id}/versions/1`;
  return { kilnId, profileId: made.id, versionId: made.version.id, path };
}

/** The version as the server keeps it. */
export async function keptVersion(app: TestApp, { path }: Draft) {
  const { body } = await (await app.as('tech')).get(`/api${path}`).expect(200);
  return body as {
    revision: number;
    state: string;
    kilnId: string;
    profile: { segments: { toC: number; rateCPerH: number | string; holdS: number; instruction: string }[] };
    load: { moulds: { label: string; overrides: Record<string, number> }[] } | null;
  };
}

export async function approve(app: TestApp, { path }: Draft): Promise<void> {
  await (await app.as('tech')).post(`/api${path}/submit`).expect(200);
  await (await app.as('teacher')).post(`/api${path}/approve`).expect(200);
}

/** A simulated firing of the public set: its plan, its kiln's plate and what its log must be found to hold. */
export interface FiringCase {
  readonly kiln: { readonly name: string } & Readonly<Record<string, number | string>>;
  readonly profile: ProfileInput & {
    readonly segments: readonly { toC: number; rateCPerH: number; holdS: number }[];
  };
  readonly toleranceC: number;
  /** On the studio's clock. */
  readonly runStart: { readonly local: string };
  readonly findings: readonly {
    readonly kind: string;
    readonly startS: number;
    readonly endS: number;
    readonly peakC: number;
    readonly byC: number;
  }[];
  /** Path of its log. */
  readonly log: string;
}

export function firingCase(id: string): FiringCase {
  const folder = join(ROOT, 'fixtures/logs', id);
  const truth = JSON.parse(readFileSync(join(folder, 'truth.json'), 'utf8')) as Omit<FiringCase, 'log'>;
  return { ...truth, log: join(folder, 'log.csv') };
}

/** A run of that firing's plan in its kiln, planned for when it was; without its log. In the first studio, in winter. */
export async function aRunOf(app: TestApp, firing: FiringCase): Promise<{ id: string; path: string }> {
  const { volts, ...plate } = firing.kiln;
  const kiln = { ...plate, energy: 'electric', voltsV: volts, waitBandC: firing.toleranceC };
  const { kilnId, versionId } = await aDraft(app, { kiln, profile: firing.profile });
  return aRun(app, { kilnId, versionId }, `${firing.runStart.local}Z`);
}

export async function aRun(
  app: TestApp,
  { kilnId, versionId }: Pick<Draft, 'kilnId' | 'versionId'>,
  plannedStartAt: string,
): Promise<{ id: string; path: string }> {
  const tech = await app.as('tech');
  const run = { kilnId, profileVersionId: versionId, plannedStartAt };
  const { id } = madeOf(await tech.post('/api/runs', run));
  return { id, path: `/runs/${id}` };
}

/** Gives a run its log without the page. */
export async function giveLog(app: TestApp, run: { id: string }, log: string): Promise<void> {
  const tech = await app.as('tech');
  madeOf(await tech.agent.post(`/api/runs/${run.id}/logs`).attach('file', log));
}
