import { studioFiguresSchema, type FigureKind, type StudioFigures } from '~/lib/materials/studio-figures';
import type { Tx } from '../database';
import { StudioFiguresRow } from '../models/studio-figures';

const figuresOf = (row: StudioFiguresRow): StudioFigures =>
  studioFiguresSchema.parse({
    kind: row.kind,
    material: row.material,
    figures: row.figures,
    note: row.note,
    revision: row.revision,
    updatedAt: row.updatedAt.toISOString(),
  });

/** Own figures of a studio, of every material that it has any of. */
export async function studioFigures(studioId: string, tx?: Tx): Promise<StudioFigures[]> {
  const rows = await StudioFiguresRow.findAll({
    where: { studioId },
    order: [
      ['kind', 'ASC'],
      ['material', 'ASC'],
    ],
    ...(tx ? { transaction: tx } : {}),
  });
  return rows.map(figuresOf).filter(({ figures, note }) => Object.keys(figures).length > 0 || note !== '');
}

/** Revision of a material's own figures, held until the transaction ends; 0: there never were any. */
export async function lockedRevision(
  studioId: string,
  kind: FigureKind,
  material: string,
  tx: Tx,
): Promise<number> {
  const row = await StudioFiguresRow.findOne({
    where: { studioId, kind, material },
    lock: tx.LOCK.UPDATE,
    transaction: tx,
  });
  return row?.revision ?? 0;
}

export async function writeFigures(
  studioId: string,
  of: { kind: FigureKind; material: string; figures: Record<string, number>; note: string },
  by: { userId: string; revision: number },
  tx: Tx,
): Promise<StudioFigures> {
  const values = { ...of, studioId, setBy: by.userId, revision: by.revision + 1, updatedAt: new Date() };
  if (by.revision === 0) return figuresOf(await StudioFiguresRow.create(values, { transaction: tx }));
  const { kind, material } = of;
  await StudioFiguresRow.update(values, { where: { studioId, kind, material }, transaction: tx });
  const row = await StudioFiguresRow.findOne({ where: { studioId, kind, material }, transaction: tx });
  if (!row) throw new Error(`figures of ${material} vanished within their own transaction`);
  return figuresOf(row);
}
