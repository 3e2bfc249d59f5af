import { describe, expect, it } from 'vitest';
import { testApp } from '../helpers/app';
import { FIRING, KILN, SHELLS } from '../helpers/studio';

const app = await testApp();
const PATH = '/api/materials/moulds/fused-silica-shell/figures';
const heavy = { figures: { heatCapacityJPerKgK: 2400 }, note: 'Weighed and fired twice.', revision: 0 };

async function firing() {
  const tech = await app.as('tech');
  const kilnId = (await tech.post('/api/kilns', KILN).expect(201)).body.id as string;
  const energy = async (): Promise<number> =>
    (await tech.post('/api/estimates', { kilnId, profile: FIRING, load: SHELLS }).expect(200)).body.energyKWh;
  return { tech, kilnId, energy };
}

describe('a studio’s own figures', () => {
  it('hold in estimates from then on, not in what is kept, not in another studio, and can be taken back', async () => {
    const { tech, kilnId, energy } = await firing();
    const before = await energy();
    const kept = (
      await tech.post('/api/profiles', { name: 'Kept', kilnId, profile: FIRING, load: SHELLS }).expect(201)
    ).body;
    const set = (await tech.post(PATH, heavy).expect(200)).body;
    expect(set).toMatchObject({
      kind: 'moulds',
      material: 'fused-silica-shell',
      revision: 1,
      ...{ note: heavy.note },
    });
    expect(await energy()).toBeGreaterThan(before * 1.02);
    const again = (await tech.get(`/api/profiles/${kept.id}/versions/1`).expect(200)).body;
    expect(again.sha256).toBe(kept.version.sha256);
    expect(again.load.moulds[0].overrides).toEqual({});
    const own = {
      ...SHELLS,
      moulds: (SHELLS.moulds ?? []).map((mould) => ({ ...mould, overrides: { heatCapacityJPerKgK: 1000 } })),
    };
    const loadsOwn = await tech.post('/api/estimates', { kilnId, profile: FIRING, load: own }).expect(200);
    expect(loadsOwn.body.energyKWh).toBeLessThan(await energy());
    const other = await app.as('otherTech');
    expect((await other.get('/api/materials').expect(200)).body.studioFigures).toEqual([]);
    expect(
      (await (await app.as('student')).get('/api/materials').expect(200)).body.studioFigures,
    ).toHaveLength(1);
    await tech.post(PATH, { figures: {}, revision: 1 }).expect(200);
    expect(await energy()).toBeCloseTo(before, 9);
    expect((await tech.get('/api/materials').expect(200)).body.studioFigures).toEqual([]);
  });

  it('of two people who change them at once one is told, and nothing of the other’s is lost', async () => {
    const tech = await app.as('tech');
    const path = '/api/materials/patterns/pla/figures';
    const put = (ashShare: number) => tech.post(path, { figures: { ashShare }, revision: 0 });
    const statuses = (await Promise.all([put(0.01), put(0.02), put(0.015)]))
      .map(({ status }) => status)
      .sort();
    expect(statuses).toEqual([200, 409, 409]);
    await put(0.03).expect(409);
    await tech.post(path, { figures: { ashShare: 0.03 }, revision: 1 }).expect(200);
  });

  it.each([
    [{ heatCapacityJPerKgK: 2.4 }, 'figures.heatCapacityJPerKgK'],
    [{ porosityShare: 1.2 }, 'figures.porosityShare'],
    [{ constructor: 1 }, 'figures.constructor'],
    [{ maxC: 5000 }, 'figures.maxC'],
    [{ densityKgPerM3: -1 }, 'figures.densityKgPerM3'],
  ])('refuses %j and says where', async (figures, path) => {
    const tech = await app.as('tech');
    const { body } = await tech.post(PATH, { figures, revision: 2 }).expect(422);
    expect(body.errors.map((each: { path: string }) => each.path)).toContain(path);
  });

  it('are of a material that the table has, and for technicians and owners to set', async () => {
    const tech = await app.as('tech');
    await tech.post('/api/materials/moulds/toffee/figures', heavy).expect(404);
    await tech.post('/api/materials/metals/copper/figures', heavy).expect(404);
    await tech.post('/api/materials/__proto__/copper/figures', heavy).expect(404);
    for (const person of ['teacher', 'student'] as const)
      await (await app.as(person)).post(PATH, heavy).expect(403);
  });
});

describe('a draft over HTTP', () => {
  it('has a reason for each segment, and says what is missing', async () => {
    const { tech, kilnId } = await firing();
    const { body } = await tech.post('/api/drafts', { kilnId, load: SHELLS }).expect(200);
    expect(body.profile.segments.length).toBeGreaterThan(0);
    body.profile.segments.forEach((_: unknown, index: number) =>
      expect(body.because.some((each: { segment: number }) => each.segment === index)).toBe(true),
    );
    const empty = await tech.post('/api/drafts', { kilnId, load: {} }).expect(422);
    expect(empty.body.errors[0].path).toBe('load.moulds');
    const unknown = { moulds: [{ material: 'toffee', massKg: 1 }] };
    expect((await tech.post('/api/drafts', { kilnId, load: unknown }).expect(422)).body.errors[0].path).toBe(
      'load.moulds.0.material',
    );
    await (await app.as('otherTech')).post('/api/drafts', { kilnId, load: SHELLS }).expect(404);
  });

  it('weighs a charge by its parts and knows its elements', async () => {
    const { tech, kilnId } = await firing();
    const pour = { metal: 'tin-bronze-90-10', chargeKg: 6, pourC: 1180 };
    const ask = (more: object) =>
      tech.post('/api/estimates', {
        kilnId,
        profile: FIRING,
        load: { ...SHELLS, pour: { ...pour, ...more } },
      });
    const parts = (massKg: number) => ({
      charge: [
        { kind: 'returns', massKg: 2 },
        { kind: 'ingot', massKg, note: 'new' },
      ],
    });
    const answer = await ask(parts(4)).expect(200);
    expect(answer.body.pour.heatKWh).toBeGreaterThan(1);
    expect((await ask(parts(5)).expect(422)).body.errors[0].path).toBe('load.pour.chargeKg');
    const alloy = { composition: { Cu: 0.88, Xx: 0.12 }, solidusC: 850, liquidusC: 1000 };
    expect((await ask({ alloy }).expect(422)).body.errors[0].path).toBe('load.pour.alloy.composition');
    await ask({ alloy: { ...alloy, composition: { Cu: 0.88, Sn: 0.12 } } }).expect(200);
  });
});
