import { beforeAll, describe, expect, it } from 'vitest';
import { tariffInputSchema, thermocoupleInputSchema } from '~/lib/contracts/equipment';
import { estimateRequestSchema } from '~/lib/contracts/profiles';
import { estimateSchema } from '~/lib/thermal/estimate-schema';
import type { Actor } from '~/lib/server/auth/actor';
import { estimateFiring } from '~/lib/server/services/estimates';
import { createKiln } from '~/lib/server/services/kilns';
import { createHandout } from '~/lib/server/services/handouts';
import { createTariff } from '~/lib/server/services/tariffs';
import { createThermocouple } from '~/lib/server/services/thermocouples';
import { testDatabase } from '../helpers/database';
import {
  addPerson,
  approvedVersion,
  FIRING,
  KILN,
  kilnInput,
  refusal,
  SHELLS,
  statusOf,
} from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, otherTech } = db.people;
let kilnId = '';
let dayTariffId = '';
let gasTariffId = '';
const tariff = (plan: object) =>
  createTariff(tech.actor, tariffInputSchema.parse({ name: 'A tariff', plan: { currency: 'GBP', ...plan } }));
beforeAll(async () => {
  dayTariffId = (await tariff({ energy: 'electricity', per: 'kWh', price: '0.25' })).id;
  gasTariffId = (await tariff({ energy: 'propane', per: 'kg', price: '2.10' })).id;
  kilnId = (await createKiln(tech.actor, kilnInput({ tariffId: dayTariffId }))).id;
});

const ask = (fields: object = {}, actor: Actor = tech.actor, query = {}) =>
  estimateFiring(
    actor,
    estimateRequestSchema.parse({ profile: FIRING, kilnId, load: SHELLS, ...fields }),
    query,
  );

describe('an estimate of record', () => {
  it('is of the shape that is promised, for a kiln of the studio and for one described on the spot', async () => {
    const kept = await ask();
    expect(estimateSchema.parse(kept)).toEqual(kept);
    const described = await ask({ kilnId: undefined, kiln: KILN });
    expect(described.energyKWh).toBe(kept.energyKWh);
    expect(described.cost).toBeNull();
  });

  it('costs its energy times the flat price of the kiln’s own tariff, to the penny', async () => {
    const { energyKWh, cost } = await ask();
    expect(energyKWh).toBeGreaterThan(1);
    expect(cost?.currency).toBe('GBP');
    expect(Number(cost?.amount)).toBeCloseTo(energyKWh * 0.25, 2);
  });

  it('takes the price of the hour: the same firing at night and by day', async () => {
    // Weekdays and weekends alike: 0.10 from midnight to noon, 0.40 from noon to midnight, studio time.
    const days = [1, 2, 3, 4, 5, 6, 7];
    const bands = [{ days, fromMinute: 0, toMinute: 720, pricePerKWh: '0.10' }];
    const { id } = await tariff({ energy: 'electricity', per: 'kWh', price: '0.40', bands });
    const short = { startC: 20, segments: [{ stage: 'drying', toC: 120, rateCPerH: 100, holdS: 3600 }] };
    const at = (startAt: string) => ask({ profile: short, tariffId: id, startAt });
    const night = await at('2026-01-15T02:00:00Z');
    const day = await at('2026-01-15T14:00:00Z');
    expect(Number(night.cost?.amount)).toBeCloseTo(night.energyKWh * 0.1, 2);
    expect(Number(day.cost?.amount)).toBeCloseTo(day.energyKWh * 0.4, 2);
  });

  it('refuses a tariff of another fuel when it is asked for, and leaves the cost open when it is the kiln’s', async () => {
    expect(await statusOf(ask({ tariffId: gasTariffId }))).toBe(422);
    const odd = await createKiln(tech.actor, kilnInput({ tariffId: gasTariffId }));
    expect((await ask({ kilnId: odd.id })).cost).toBeNull();
  });

  it('shows the curves of the mould that is asked for', async () => {
    const moulds = [
      { material: 'fused-silica-shell', massKg: 1, wallM: 0.005 },
      { material: 'fused-silica-shell', massKg: 9, wallM: 0.02 },
    ];
    expect((await ask({ load: { moulds } })).mould).toBe(1);
    expect((await ask({ load: { moulds } }, tech.actor, { mould: 0 })).mould).toBe(0);
    const refused = await refusal(ask({ load: { moulds } }, tech.actor, { mould: 2 }));
    expect([refused.status, refused.options.errors?.[0]?.path]).toEqual([422, 'mould']);
  });

  it('warns of somebody needed at the kiln when nobody is there, by the clock of the studio', async () => {
    const attended = {
      startC: 20,
      segments: [{ stage: 'drying', toC: 120, rateCPerH: 100, holdS: 3600, attended: true }],
    };
    const codes = async (startAt?: string) =>
      (await ask({ profile: attended, startAt })).cautions.map((caution) => caution.code);
    expect(await codes('2026-01-15T01:00:00Z')).toContain('attended-at-night');
    expect(await codes('2026-01-15T10:00:00Z')).not.toContain('attended-at-night');
    // In July the studio's clocks, in London, are an hour ahead: 18:30 UTC plus two hours is past eight there.
    expect(await codes('2026-07-15T17:30:00Z')).toContain('attended-at-night');
    expect(await codes('2026-01-15T17:30:00Z')).not.toContain('attended-at-night');
    expect(await codes()).not.toContain('attended-at-night');
  });

  it('knows the limit of the kiln’s thermocouple', async () => {
    const input = thermocoupleInputSchema.parse({ name: 'Thin', type: 'K', maxC: 800 });
    const couple = await createThermocouple(tech.actor, input);
    const kiln = await createKiln(tech.actor, kilnInput({ thermocoupleId: couple.id }));
    const codes = (await ask({ kilnId: kiln.id })).cautions.map((caution) => caution.code);
    expect(codes).toContain('above-thermocouple-limit');
    expect((await ask()).cautions.map((caution) => caution.code)).not.toContain('above-thermocouple-limit');
  });

  it('cannot be had of materials that the table does not have, nor of a plan beyond 14 days', async () => {
    const strange = await refusal(ask({ load: { moulds: [{ material: 'clay-and-hope', massKg: 1 }] } }));
    expect([strange.status, strange.options.errors?.[0]?.path]).toEqual([422, 'load.moulds.0.material']);
    const lining = { ...KILN, liningLayers: [{ material: 'straw', thicknessM: 0.1 }] };
    expect(await statusOf(ask({ kilnId: undefined, kiln: lining }))).toBe(422);
    const segments = [1, 2, 3].map((n) => ({
      stage: 'burnout',
      toC: n * 200,
      rateCPerH: 100,
      holdS: 604800,
    }));
    expect(await statusOf(ask({ profile: { startC: 20, segments } }))).toBe(422);
  });
});

describe('a kiln of three megawatts in the space of a drainpipe', () => {
  it('is refused in reasonable time, instead of holding everybody up', async () => {
    const kiln = {
      energy: 'gas',
      innerWidthM: 0.05,
      innerDepthM: 0.7,
      innerHeightM: 20,
      lining: 'brick',
      liningM: 0.01,
      burnerKW: 3000,
      fuel: 'propane',
      excessAirShare: 3,
      maxC: 870,
    };
    const profile = {
      startC: -20,
      segments: [-2, 57, 900, -2, 1397, 7].map((toC) => ({
        stage: 'burnout',
        toC,
        rateCPerH: 'flat-out',
        holdS: 40_000,
        vent: 'open',
      })),
    };
    const moulds = [
      {
        form: 'flask',
        material: 'fused-silica-shell',
        count: 465,
        massKg: 0.045,
        diameterM: 0.05,
        heightM: 1.4,
      },
      { material: 'phosphate-investment', count: 357, massKg: 0.014, wallM: 0.0068 },
    ];
    const refused = await refusal(ask({ kilnId: undefined, kiln, profile, load: { moulds }, ambientC: 0 }));
    expect([refused.status, refused.options.errors?.[0]?.path]).toEqual([422, 'kiln']);
  });
});

describe('who may ask', () => {
  it('is nobody for another studio’s kiln or tariff', async () => {
    expect(await statusOf(ask({}, otherTech.actor))).toBe(404);
    const kiln = await createKiln(otherTech.actor, kilnInput());
    expect(await statusOf(ask({ kilnId: kiln.id, tariffId: dayTariffId }, otherTech.actor))).toBe(404);
  });

  it('is a student for a kiln that was handed out, without the cost', async () => {
    const student = await addPerson(db, tech.studioId, 'Jo Pell', 'student');
    expect(await statusOf(ask({}, student))).toBe(404);
    const { version } = await approvedVersion(db.people, kilnId);
    await createHandout(teacher.actor, {
      profileVersionId: version.id,
      kilnId,
      classId: null,
      personIds: [student.userId],
      fromAt: '2026-03-01T00:00:00Z',
      untilAt: '2026-03-08T00:00:00Z',
      note: '',
    });
    const shown = await ask({}, student);
    expect(shown.cost).toBeNull();
    expect(shown.energyKWh).toBe((await ask()).energyKWh);
    expect(await statusOf(ask({ tariffId: dayTariffId }, student))).toBe(404);
  });
});
