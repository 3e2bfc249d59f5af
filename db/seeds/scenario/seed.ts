import {
  furnaceInputSchema,
  kilnInputSchema,
  tariffInputSchema,
  thermocoupleInputSchema,
} from '~/lib/contracts/equipment';
import { profileSchema } from '~/lib/profile/schema';
import { loadSchema, type Load } from '~/lib/thermal/load-schema';
import type { Actor } from '~/lib/server/auth/actor';
import { createClass } from '~/lib/server/services/classes';
import { decideFinding, listFindings } from '~/lib/server/services/findings';
import { createHandout } from '~/lib/server/services/handouts';
import { createFurnace } from '~/lib/server/services/furnaces';
import { createKiln } from '~/lib/server/services/kilns';
import { importLog } from '~/lib/server/services/log-import';
import { approveVersion, createProfile, submitVersion } from '~/lib/server/services/profiles';
import { createRun, signOffRun, startRun } from '~/lib/server/services/runs';
import { createTariff } from '~/lib/server/services/tariffs';
import { createThermocouple } from '~/lib/server/services/thermocouples';
import { demoAccounts, type DemoKey } from '../people';
import { RUNS, type DemoRun } from './firings';
import { LOADS, PROFILES, type KilnKey, type LoadKey, type ProfileKey } from './plans';
import { simulateFiring } from './firing-simulator';
import { writeLog } from './log-writer';
import {
  BENCH_KILN,
  FERRY_KILN,
  FURNACE,
  TALL_KILN,
  TARIFFS,
  THERMOCOUPLES,
  YARD_KILN,
  type DemoKiln,
} from './plates';

const DAY_MS = 86_400_000;
const KILNS: Record<KilnKey, DemoKiln> = { tall: TALL_KILN, bench: BENCH_KILN, yard: YARD_KILN };

/** Somebody of the demo studios, acting as they would through the site. */
function actor(key: DemoKey): Actor {
  const person = demoAccounts.people.find((one) => one.key === key);
  const studio = person && demoAccounts.studios[person.studio];
  if (!person || !studio) throw new Error(`no demo account '${key}'`);
  return {
    userId: person.id,
    studioId: studio.id,
    roles: person.roles as Actor['roles'],
    sessionId: person.id,
  };
}

interface Seeded {
  readonly kilnIds: Record<KilnKey, string>;
  readonly versionIds: Record<ProfileKey, string>;
}

/**
 * The demo: kilns, profiles, a class, handouts and a dozen runs whose logs come from a simulator of its own. Everything goes
 * through the services that the site uses, so that no demo row can be one that a person could not have made.
 */
export async function seedScenario(now: Date): Promise<void> {
  const seeded = await seedQuarryLane(now);
  for (const [index, run] of RUNS.entries()) await seedRun(run, index, seeded, now);
  await seedToday(seeded, now);
  await seedFerryRoad(now);
}

async function seedQuarryLane(now: Date): Promise<Seeded> {
  const tech = actor('tech');
  const power = await createTariff(tech, tariffInputSchema.parse(TARIFFS.power));
  const gas = await createTariff(tech, tariffInputSchema.parse(TARIFFS.gas));
  const furnace = await createFurnace(tech, furnaceInputSchema.parse({ ...FURNACE, tariffId: gas.id }));
  const thermocoupleIds: string[] = [];
  for (const one of THERMOCOUPLES)
    thermocoupleIds.push((await createThermocouple(tech, thermocoupleInputSchema.parse(one))).id);
  const kilnIds = {} as Record<KilnKey, string>;
  for (const [index, key] of (['tall', 'bench', 'yard'] as const).entries()) {
    const plate = {
      ...KILNS[key].plate,
      tariffId: key === 'yard' ? gas.id : power.id,
      thermocoupleId: thermocoupleIds[index] ?? null,
    };
    kilnIds[key] = (await createKiln(tech, kilnInputSchema.parse(plate))).id;
  }
  const versionIds = {
    printedShell: await profile(
      'tech',
      'Printed shell, 8 mm wall',
      'printedShell',
      'printedShells',
      kilnIds.tall,
      'approved',
      furnace.id,
    ),
    waxShell: await profile('tech', 'Wax shell, straight in', 'waxShell', 'waxShells', kilnIds.yard, 'draft'),
    plasterFlask: await profile(
      'tech',
      'Plaster flask, 89 mm',
      'plasterFlask',
      'flasks',
      kilnIds.bench,
      'approved',
    ),
    resinShell: await profile(
      'tech',
      'Resin lattice, slow',
      'resinShell',
      'resinShells',
      kilnIds.tall,
      'in-review',
    ),
    refire: await profile('tech', 'Refire to pour', 'refire', 'emptyShells', kilnIds.tall, 'approved'),
  };
  const students = (['student', 'studentTwo', 'studentThree'] as const).map((key) => actor(key).userId);
  const teacher = actor('teacher');
  const group = await createClass(teacher, {
    name: 'Bronze, second year',
    term: 'Autumn',
    memberIds: students,
  });
  await createHandout(
    teacher,
    {
      profileVersionId: versionIds.printedShell,
      kilnId: kilnIds.tall,
      classId: group.id,
      personIds: [],
      fromAt: new Date(now.getTime() - 2 * DAY_MS).toISOString(),
      untilAt: new Date(now.getTime() + 12 * DAY_MS).toISOString(),
      note: 'Work in pairs. Somebody stays for the drain.',
    },
    now,
  );
  // A student sees a kiln once something was handed out for it.
  const medal = await profile('student', 'Medal, first try', 'medal', 'printedShells', kilnIds.tall, 'draft');
  return { kilnIds, versionIds: { ...versionIds, medal } };
}

/** The load with its pour, if it has one, from a furnace of the studio. */
const pouredFrom = (load: Load, furnaceId: string | null): Load =>
  load.pour === null ? load : { ...load, pour: { ...load.pour, furnaceId } };

async function profile(
  author: DemoKey,
  name: string,
  key: ProfileKey,
  load: LoadKey,
  kilnId: string,
  until: 'draft' | 'in-review' | 'approved',
  furnaceId: string | null = null,
): Promise<string> {
  const by = actor(author);
  const { id, version } = await createProfile(by, {
    name,
    kilnId,
    profile: profileSchema.parse(PROFILES[key]),
    load: pouredFrom(loadSchema.parse(LOADS[load]), furnaceId),
  });
  if (until === 'draft') return version.id;
  await submitVersion(by, id, 1, { note: 'Ready for a look.' });
  if (until === 'approved') {
    await approveVersion(actor('teacher'), id, 1, { overrides: [] });
  }
  return version.id;
}

async function seedRun(run: DemoRun, index: number, seeded: Seeded, now: Date): Promise<void> {
  const tech = actor('tech');
  const startMs = localHour(now.getTime() - run.daysAgo * DAY_MS, run.hour);
  const planned = await createRun(tech, {
    kilnId: seeded.kilnIds[run.kiln],
    profileVersionId: seeded.versionIds[run.profile],
    plannedStartAt: new Date(startMs).toISOString(),
    note: run.note,
  });
  const rows = simulateFiring({
    profile: profileSchema.parse(PROFILES[run.profile]),
    kiln: KILNS[run.kiln].simulated,
    faults: run.faults,
    seed: 7919 * (index + 1),
    intervalS: run.intervalS,
    noiseC: run.noiseC,
    coolingS: 2 * 3600,
  });
  const text = writeLog(rows, startMs, timeZoneOf(tech), run.habit);
  await importLog(tech, planned.id, async (take) => {
    await take(`run-${planned.number}.csv`, bytesOf(text));
    return new Map();
  });
  if (index === 2) await confirmFirst(planned.id, now);
  if (index < 5) await signOffRun(actor('teacher'), planned.id, 'Seen with the technician.', now);
}

async function* bytesOf(text: string): AsyncGenerator<Uint8Array> {
  yield await Promise.resolve(new TextEncoder().encode(text));
}

async function confirmFirst(runId: string, now: Date): Promise<void> {
  const { items } = await listFindings(actor('tech'), runId, { limit: 50 });
  const found = items.find((finding) => finding.kind === 'overshoot');
  if (!found) throw new Error('the review did not find the overshoot that was put into the demo log');
  const followUp = {
    text: 'Tune the programmer at 900 °C before the next heron.',
    dueAt: new Date(now.getTime() - 30 * DAY_MS).toISOString(),
    doneAt: null,
  };
  await decideFinding(
    actor('tech'),
    runId,
    found.id,
    found.revision,
    { state: 'confirmed', remark: 'Two shells glazed at the lip.', followUp },
    now,
  );
}

/** What stands on the board today: a run under way and one planned. */
async function seedToday(seeded: Seeded, now: Date): Promise<void> {
  const tech = actor('tech');
  const underWay = await createRun(tech, {
    kilnId: seeded.kilnIds.tall,
    profileVersionId: seeded.versionIds.printedShell,
    plannedStartAt: new Date(now.getTime() - 3 * 3_600_000).toISOString(),
    note: 'Heron, second cast.',
  });
  await startRun(
    tech,
    underWay.id,
    { startedAt: new Date(now.getTime() - 3 * 3_600_000).toISOString() },
    now,
  );
  await createRun(tech, {
    kilnId: seeded.kilnIds.bench,
    profileVersionId: seeded.versionIds.plasterFlask,
    plannedStartAt: new Date(localHour(now.getTime() + DAY_MS, 7)).toISOString(),
    note: '',
  });
}

async function seedFerryRoad(now: Date): Promise<void> {
  const tech = actor('otherTech');
  const tariff = await createTariff(tech, tariffInputSchema.parse(TARIFFS.ferry));
  const kiln = await createKiln(tech, kilnInputSchema.parse({ ...FERRY_KILN.plate, tariffId: tariff.id }));
  const { version } = await createProfile(tech, {
    name: 'House shell',
    kilnId: kiln.id,
    profile: profileSchema.parse(PROFILES.refire),
    load: loadSchema.parse(LOADS.emptyShells),
  });
  await createRun(tech, {
    kilnId: kiln.id,
    profileVersionId: version.id,
    plannedStartAt: new Date(localHour(now.getTime() + 2 * DAY_MS, 9)).toISOString(),
    note: '',
  });
}

function timeZoneOf(who: Actor): string {
  return demoAccounts.studios.find((studio) => studio.id === who.studioId)?.timeZone ?? 'UTC';
}

/** The instant of a local hour on the day of `ms` in the first studio's zone. Good to the hour on days when the clocks change. */
function localHour(ms: number, hour: number): number {
  const zone = demoAccounts.studios[0]?.timeZone ?? 'UTC';
  const midnight = Math.floor(ms / DAY_MS) * DAY_MS;
  const shown = Number(
    new Intl.DateTimeFormat('en-GB', { timeZone: zone, hourCycle: 'h23', hour: '2-digit' }).format(midnight),
  );
  const offsetH = shown > 12 ? shown - 24 : shown;
  return midnight + (hour - offsetH) * 3_600_000;
}
