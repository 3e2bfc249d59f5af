import { describe, expect, it } from 'vitest';
import { furnaceInputSchema, tariffInputSchema, thermocoupleInputSchema } from '~/lib/contracts/equipment';
import { database } from '~/lib/server/database';
import { createFurnace, updateFurnace } from '~/lib/server/services/furnaces';
import { createKiln, getKiln, listKilns, updateKiln } from '~/lib/server/services/kilns';
import { createTariff, getTariff } from '~/lib/server/services/tariffs';
import { createThermocouple } from '~/lib/server/services/thermocouples';
import { testDatabase } from '../helpers/database';
import { kilnInput, refusal, statementsOf, statusOf } from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, otherTech } = db.people;
const all = { limit: 50, archived: 'no' } as const;

describe('a kiln', () => {
  it('keeps what stands on its plate, with what was left out at its default', async () => {
    const kiln = await createKiln(tech.actor, kilnInput({ name: 'Front loader', voltsV: 400 }));
    expect(kiln).toMatchObject({ ratedKW: 12, voltsV: 400, supplyV: null, openAtC: 120, revision: 1 });
    expect(await getKiln(tech.actor, kiln.id)).toEqual(kiln);
  });

  it('is added and changed by technicians and owners only', async () => {
    expect(await statusOf(createKiln(teacher.actor, kilnInput()))).toBe(403);
    const kiln = await createKiln(db.people.owner.actor, kilnInput());
    expect(await statusOf(updateKiln(teacher.actor, kiln.id, 1, { maxC: 1200 }))).toBe(403);
  });

  it('is validated as a whole when a part of it changes', async () => {
    const kiln = await createKiln(tech.actor, kilnInput());
    const changed = await updateKiln(tech.actor, kiln.id, 1, { maxC: 1100, note: 'New elements in May' });
    expect(changed).toMatchObject({ maxC: 1100, ratedKW: 12, note: 'New elements in May', revision: 2 });
    const refused = await refusal(updateKiln(tech.actor, kiln.id, 2, { maxC: 1900 }));
    expect(refused.status).toBe(422);
    expect(refused.options.errors?.[0]?.path).toBe('maxC');
    expect(await statusOf(updateKiln(tech.actor, kiln.id, 2, { burnerKW: 20 }))).toBe(422);
    expect(await getKiln(tech.actor, kiln.id)).toEqual(changed);
  });

  it('may be rebuilt from electric to gas without naming what it no longer has', async () => {
    const kiln = await createKiln(tech.actor, kilnInput({ voltsV: 230 }));
    const rebuilt = await updateKiln(tech.actor, kiln.id, 1, {
      energy: 'gas',
      burnerKW: 30,
      fuel: 'propane',
    });
    expect(rebuilt).toMatchObject({ energy: 'gas', burnerKW: 30, excessAirShare: 0.25 });
    expect(rebuilt).not.toHaveProperty('ratedKW');
    expect(await getKiln(tech.actor, kiln.id)).toEqual(rebuilt);
  });

  it('refuses a stale revision and shows the newer kiln', async () => {
    const kiln = await createKiln(tech.actor, kilnInput());
    const newer = await updateKiln(tech.actor, kiln.id, 1, { name: 'Renamed' });
    const refused = await refusal(updateKiln(tech.actor, kiln.id, 1, { name: 'Too late' }));
    expect([refused.status, refused.options.current]).toEqual([412, newer]);
  });

  it('takes one of two changes made to the same revision at the same moment', async () => {
    const kiln = await createKiln(tech.actor, kilnInput());
    const results = await Promise.allSettled(
      [1, 2, 3, 4].map((n) => updateKiln(tech.actor, kiln.id, 1, { name: `Change ${n}` })),
    );
    expect(results.filter((result) => result.status === 'fulfilled')).toHaveLength(1);
    expect((await getKiln(tech.actor, kiln.id)).revision).toBe(2);
  });

  it('leaves the list when it is archived, and comes back', async () => {
    const kiln = await createKiln(tech.actor, kilnInput({ name: 'Old brick kiln' }));
    const put = await updateKiln(tech.actor, kiln.id, 1, { archived: true });
    expect(put.archivedAt).not.toBeNull();
    const named = (archived: 'no' | 'yes') => listKilns(tech.actor, { limit: 50, archived, q: 'old brick' });
    expect((await named('no')).items).toEqual([]);
    expect((await named('yes')).items).toEqual([put]);
    const back = await updateKiln(tech.actor, kiln.id, 2, { archived: false });
    expect((await named('no')).items).toEqual([back]);
    expect(await statusOf(updateKiln(tech.actor, kiln.id, 3, { archived: 'no' }))).toBe(422);
  });

  it('names its lining by materials that the table has', async () => {
    const layers = (material: string) => kilnInput({ liningLayers: [{ material, thicknessM: 0.1 }] });
    expect(await statusOf(createKiln(tech.actor, layers('unobtainium-brick')))).toBe(422);
  });
});

describe('a list of kilns', () => {
  it('gives every kiln once, page after page, however many share a name', async () => {
    for (let n = 0; n < 7; n++) await createKiln(tech.actor, kilnInput({ name: 'paged Kiln' }));
    await createKiln(tech.actor, kilnInput({ name: 'Paged apart' }));
    const seen: string[] = [];
    let cursor: string | undefined;
    do {
      const answer = await listKilns(tech.actor, { ...all, limit: 3, cursor, q: 'PAGED' });
      seen.push(...answer.items.map((kiln) => kiln.id));
      cursor = answer.nextCursor ?? undefined;
    } while (cursor);
    expect(seen).toHaveLength(8);
    expect(new Set(seen).size).toBe(8);
  });

  it('searches for signs as they are typed', async () => {
    await createKiln(tech.actor, kilnInput({ name: 'At 50% power_now \\ later' }));
    for (const q of ['50%', 'power_now', '\\ later'])
      expect((await listKilns(tech.actor, { ...all, q })).items, q).toHaveLength(1);
    expect((await listKilns(tech.actor, { ...all, q: '5_% p%r' })).items).toEqual([]);
  });

  it('refuses a cursor that no list gave out', async () => {
    expect(await statusOf(listKilns(tech.actor, { ...all, cursor: 'bm90aGluZw' }))).toBe(400);
  });

  it('is read with one statement however long it is', async () => {
    expect(await statementsOf(() => listKilns(tech.actor, all))).toBe(1);
  });
});

describe('what belongs to another studio', () => {
  it('is not there: neither to read, nor to change, nor to list', async () => {
    const kiln = await createKiln(tech.actor, kilnInput({ name: 'Ours alone' }));
    expect(await statusOf(getKiln(otherTech.actor, kiln.id))).toBe(404);
    expect(await statusOf(updateKiln(otherTech.actor, kiln.id, 1, { name: 'Theirs' }))).toBe(404);
    expect((await listKilns(otherTech.actor, { ...all, q: 'ours alone' })).items).toEqual([]);
    expect(await statusOf(getKiln(tech.actor, 'no-id-at-all'))).toBe(404);
  });

  it('cannot be linked, not even past the services', async () => {
    const foreign = await createThermocouple(
      otherTech.actor,
      thermocoupleInputSchema.parse({ name: 'Theirs', type: 'K' }),
    );
    expect(await statusOf(createKiln(tech.actor, kilnInput({ thermocoupleId: foreign.id })))).toBe(404);
    const kiln = await createKiln(tech.actor, kilnInput());
    const link = db.query('update kilns set thermocouple_id = $1 where id = $2', [foreign.id, kiln.id]);
    await expect(link).rejects.toThrow(/foreign key/);
  });
});

describe('the database itself', () => {
  it('refuses a kiln that is both electric and gas, and a temperature that is no number', async () => {
    const kiln = await createKiln(tech.actor, kilnInput());
    for (const change of [
      'burner_kw = 20',
      "energy = 'gas'",
      "max_c = 'NaN'",
      "max_c = 'Infinity'",
      "name = ''",
    ])
      await expect(db.query(`update kilns set ${change} where id = $1`, [kiln.id]), change).rejects.toThrow(
        /check constraint/,
      );
  });

  it('lets the application archive a kiln but not delete it', async () => {
    await expect(database().query('delete from kilns')).rejects.toThrow(/permission denied/);
  });
});

describe('tariffs, thermocouples and furnaces', () => {
  it('keep a price with the digits that were typed', async () => {
    const plan = { currency: 'EUR', energy: 'electricity', per: 'kWh', price: '0.310' };
    const tariff = await createTariff(tech.actor, tariffInputSchema.parse({ name: 'Night', plan }));
    expect((await getTariff(tech.actor, tariff.id)).plan.price).toBe('0.310');
    const byWeight = tariffInputSchema.parse({ name: 'Wrong', plan: { ...plan, per: 'kg' } });
    expect(await statusOf(createTariff(tech.actor, byWeight))).toBe(422);
  });

  it('refuse a calibration table that says two things of one temperature', async () => {
    const calibration = [
      { atC: 500, offsetC: 1 },
      { atC: 500, offsetC: 2 },
    ];
    const input = thermocoupleInputSchema.parse({ name: 'K1', type: 'K', calibration });
    expect(await statusOf(createThermocouple(tech.actor, input))).toBe(422);
  });

  it('rebuild a furnace from gas to electric', async () => {
    const gas = { name: 'Melter', energy: 'gas', burnerKW: 40, fuel: 'propane', capacityKg: 30, maxC: 1300 };
    const furnace = await createFurnace(tech.actor, furnaceInputSchema.parse(gas));
    const rebuilt = await updateFurnace(tech.actor, furnace.id, 1, { energy: 'electric', ratedKW: 15 });
    expect(rebuilt).toMatchObject({ energy: 'electric', ratedKW: 15, revision: 2 });
    expect(rebuilt).not.toHaveProperty('fuel');
  });
});
