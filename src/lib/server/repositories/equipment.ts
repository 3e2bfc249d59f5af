import { Op, type Model, type ModelStatic, type WhereOptions } from 'sequelize';
import type { Tx } from '../database';
import { decodeCursor, page } from '../http/pagination';
import { likeAnywhere } from './row';

type Row = Record<string, unknown>;
export type EquipmentModel = ModelStatic<Model<Row, Row>>;

/** What every piece of equipment has, of whatever kind. */
export interface Kept {
  readonly id: string;
  readonly name: string;
  readonly revision: number;
  readonly archivedAt: string | null;
}

export interface EquipmentFilter {
  readonly limit: number;
  readonly cursor?: string | undefined;
  readonly q?: string | undefined;
  readonly archived: 'no' | 'yes' | 'all';
  /** Only these; undefined: all of the studio. */
  readonly ids?: readonly string[] | undefined;
}

export interface EquipmentRepository<Thing extends Kept, Input> {
  list(studioId: string, filter: EquipmentFilter): Promise<{ items: Thing[]; nextCursor: string | null }>;
  find(studioId: string, id: string, tx?: Tx): Promise<Thing | null>;
  /** Holds the row until the transaction ends. */
  lock(studioId: string, id: string, tx: Tx): Promise<Thing | null>;
  insert(studioId: string, id: string, input: Input, tx: Tx): Promise<Thing>;
  /** Writes the whole thing and counts its revision up; the caller holds the row. */
  update(studioId: string, id: string, change: EquipmentChange<Input>, tx: Tx): Promise<Thing>;
}

export interface EquipmentChange<Input> {
  readonly input: Input;
  readonly archivedAt: Date | null;
  readonly revision: number;
}

/**
 * Reads and writes one kind of equipment, by name and id within a studio.
 *
 * @param model the table
 * @param thingOf a row, every column of it, as the plain thing
 * @param rowOf the columns of an input, every one of them, those that do not apply as null
 */
export function equipmentRepository<Thing extends Kept, Input>(
  model: EquipmentModel,
  thingOf: (row: Row) => Thing,
  rowOf: (input: Input) => Row,
): EquipmentRepository<Thing, Input> {
  const read = (row: Model<Row, Row> | null) => (row ? thingOf(row.get({ plain: true })) : null);
  return {
    async list(studioId, filter) {
      const rows = await model.findAll({
        where: matching(studioId, filter),
        order: [
          ['nameKey', 'ASC'],
          ['id', 'ASC'],
        ],
        limit: filter.limit + 1,
      });
      const plain = rows.map((row) => row.get({ plain: true }) as Row & { id: string });
      const { items, nextCursor } = page(plain, filter.limit, (row) => String(row['nameKey']));
      return { items: items.map(thingOf), nextCursor };
    },
    async find(studioId, id, tx) {
      return read(await model.findOne({ where: { studioId, id }, ...(tx ? { transaction: tx } : {}) }));
    },
    async lock(studioId, id, tx) {
      return read(
        await model.findOne({ where: { studioId, id }, transaction: tx, lock: tx.LOCK.NO_KEY_UPDATE }),
      );
    },
    async insert(studioId, id, input, tx) {
      return thingOf(
        (await model.create({ ...rowOf(input), studioId, id }, { transaction: tx })).get({ plain: true }),
      );
    },
    async update(studioId, id, { input, archivedAt, revision }, tx) {
      const [, rows] = await model.update(
        { ...rowOf(input), archivedAt, revision: revision + 1, updatedAt: new Date() },
        { where: { studioId, id, revision }, transaction: tx, returning: true },
      );
      const row = rows[0];
      if (!row) throw new Error(`${model.name} ${id} was not at revision ${revision}, though it was held`);
      return thingOf(row.get({ plain: true }));
    },
  };
}

function matching(studioId: string, filter: EquipmentFilter): WhereOptions<Row> {
  const after = decodeCursor(filter.cursor);
  const conditions: WhereOptions<Row>[] = [{ studioId }];
  if (filter.archived !== 'all')
    conditions.push({ archivedAt: filter.archived === 'yes' ? { [Op.ne]: null } : null });
  if (filter.ids) conditions.push({ id: { [Op.in]: [...filter.ids] } });
  if (filter.q) conditions.push({ name: { [Op.iLike]: likeAnywhere(filter.q) } });
  if (after)
    conditions.push({
      [Op.or]: [
        { nameKey: { [Op.gt]: String(after.sort) } },
        { nameKey: String(after.sort), id: { [Op.gt]: after.id } },
      ],
    });
  return { [Op.and]: conditions };
}
