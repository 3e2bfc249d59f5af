import type { z } from '~/lib/zod';
import type { Furnace, Kiln } from '~/lib/contracts/equipment';
import type { estimateRequestSchema, estimateRoutes } from '~/lib/contracts/profiles';
import { tariffFits, zoneOffset, type TariffPlan } from '~/lib/planning';
import { forecastOf } from '~/lib/planning/forecast';
import type { Profile } from '~/lib/profile/schema';
import { issuesOf } from '~/lib/profile/validate';
import { cautionsOf, type CautionContext } from '~/lib/thermal/cautions';
import type { Caution, Estimate } from '~/lib/thermal/estimate-schema';
import type { KilnPlate } from '~/lib/thermal/kiln-schema';
import { loadSchema, type Load } from '~/lib/thermal/load-schema';
import { isOnlyStudent, type Actor } from '../auth/actor';
import type { Tx } from '../database';
import { HoldfastError, notFound, notValid, type Issue } from '../errors';
import { studioRules } from '../repositories/studio-rules';
import { thermocouples } from '../repositories/thermocouples';
import { loadIssues } from './content-check';
import { simulated } from './firing';
import { getFurnace } from './furnaces';
import { kilnFor, liningIssues, plateOf, requireLinks } from './kilns';
import { loadInForce } from './studio-figures';
import { tariffFor } from './tariffs';

type Request = z.output<typeof estimateRequestSchema>;
type Query = z.output<(typeof estimateRoutes)['estimate']['query']>;

/** Temperature of the room where nobody says another. */
const ROOM_C = 20;

/**
 * What the models say of a firing: the figure of record. Nothing is kept. Costs are not shown to students.
 *
 * @param now the start that prices by time of use are taken from where the request names none
 */
export async function estimateFiring(
  actor: Actor,
  request: Request,
  query: Query,
  now = new Date(),
): Promise<Estimate> {
  const kiln = await kilnOf(actor, request);
  const plate = plateOf(kiln);
  const load = request.load ?? loadSchema.parse({});
  requireComputable(request.profile, plate, load, query);
  const kilnPlan = await planFor(actor, request, kiln, plate);
  const startMs = request.startAt === undefined ? null : Date.parse(request.startAt);
  const context = await cautionContext(actor, kiln, load, startMs);
  const inForce = await loadInForce(actor, load);
  const simulation = simulated({
    profile: request.profile,
    kiln: plate,
    load: inForce,
    ambientC: request.ambientC,
  });
  const found = forecastOf(simulation, {
    mouldIndex: query.mould ?? null,
    context,
    kilnPlan,
    furnacePlan: (await tariffFor(actor, context.furnace?.tariffId ?? null))?.plan ?? null,
    pricedFromMs: startMs ?? now.getTime(),
  });
  return isOnlyStudent(actor) ? withoutMoney(found) : found;
}

/** What a student is not shown. */
const withoutMoney = (estimate: Estimate): Estimate => ({
  ...estimate,
  cost: null,
  split: estimate.split.map((line) => ({ ...line, cost: null })),
  pour: estimate.pour && { ...estimate.pour, cost: null },
});

/** The furnace that the load's pour names; null: none, or one that this person may not see. */
async function pouringFurnace(actor: Actor, load: Load, tx?: Tx): Promise<Furnace | null> {
  const furnaceId = load.pour?.furnaceId ?? null;
  if (furnaceId === null) return null;
  try {
    return await getFurnace(actor, furnaceId, tx);
  } catch (error) {
    if (error instanceof HoldfastError && error.code === 'not-found') return null;
    throw error;
  }
}

type Links = Pick<Kiln, 'thermocoupleId' | 'tariffId'>;

/** The studio's kiln that the request names, or the one it describes, whose links must be the studio's. */
async function kilnOf(actor: Actor, { kilnId, kiln }: Request) {
  if (kilnId !== undefined) return kilnFor(actor, kilnId);
  if (!kiln) throw notValid('Say which kiln.', [{ path: 'kilnId', message: 'a kiln is needed' }]);
  if (isOnlyStudent(actor)) return { ...kiln, thermocoupleId: null, tariffId: null };
  await requireLinks(actor, kiln);
  return kiln;
}

/** Cautions of a version in a kiln, whenever it is fired: what its approval and its handouts go by. */
export async function versionCautions(
  actor: Actor,
  content: { readonly profile: Profile; readonly kilnId: string; readonly load: Load | null },
  tx: Tx,
): Promise<Caution[]> {
  const kiln = await kilnFor(actor, content.kilnId, tx);
  const load = content.load ?? loadSchema.parse({});
  const inForce = await loadInForce(actor, load, tx);
  const simulation = simulated({
    profile: content.profile,
    kiln: plateOf(kiln),
    load: inForce,
    ambientC: ROOM_C,
  });
  return cautionsOf(simulation, await cautionContext(actor, kiln, load, null, tx));
}

/** What the rules go by besides the curves: the studio's hours, zone and units, the kiln's thermocouple, the pour's furnace. */
export async function cautionContext(
  actor: Actor,
  { thermocoupleId }: Pick<Links, 'thermocoupleId'>,
  load: Load,
  startMs: number | null,
  tx?: Tx,
): Promise<CautionContext & { furnace: Furnace | null }> {
  const { studioId } = actor;
  const rules = await studioRules(studioId, tx);
  const thermocouple = thermocoupleId ? await thermocouples.find(studioId, thermocoupleId, tx) : null;
  return {
    startMs,
    offsetMinutesAt: zoneOffset(rules.timeZone),
    attendedHours: { fromMinute: rules.attendedFromMinute, toMinute: rules.attendedUntilMinute },
    thermocouple,
    furnace: await pouringFurnace(actor, load, tx),
    units: rules.units,
  };
}

/** The tariff that the request names, else the kiln's own where it prices what the kiln burns. */
async function planFor(
  actor: Actor,
  request: Request,
  kiln: Links,
  plate: KilnPlate,
): Promise<TariffPlan | null> {
  if (request.tariffId !== undefined) {
    const tariff = isOnlyStudent(actor) ? null : await tariffFor(actor, request.tariffId);
    if (!tariff) throw notFound('tariff');
    if (!tariffFits(tariff.plan, plate))
      throw notValid(`${tariff.name} prices ${tariff.plan.energy}, which this kiln does not use.`, [
        { path: 'tariffId', message: `a tariff of ${tariff.plan.energy}` },
      ]);
    return tariff.plan;
  }
  const own = await tariffFor(actor, kiln.tariffId);
  return own && tariffFits(own.plan, plate) ? own.plan : null;
}

/** What the schemas of the request cannot say: planned length, materials that the table has, a mould that is there. */
function requireComputable(profile: Profile, plate: KilnPlate, load: Load, query: Query): void {
  const issues: Issue[] = [
    ...issuesOf(profile).map((issue) => ({ ...issue, path: `profile.${issue.path}` })),
    ...liningIssues(plate).map((issue) => ({ ...issue, path: `kiln.${issue.path}` })),
    ...loadIssues(load),
  ];
  if (query.mould !== undefined && query.mould >= load.moulds.length)
    issues.push({ path: 'mould', message: `the load has ${load.moulds.length} lines of moulds` });
  const first = issues[0];
  if (first) throw notValid(`This cannot be computed. ${first.path}: ${first.message}.`, issues);
}
