import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** A studio's own figures of one material, in place of the table's. */
export class StudioFiguresRow extends Model<
  InferAttributes<StudioFiguresRow>,
  InferCreationAttributes<StudioFiguresRow>
> {
  declare studioId: string;
  declare kind: string;
  declare material: string;
  declare figures: Record<string, number>;
  declare note: CreationOptional<string>;
  declare revision: CreationOptional<number>;
  declare setBy: string;
  declare updatedAt: CreationOptional<Date>;
}

export function initStudioFigures(sequelize: Sequelize): void {
  StudioFiguresRow.init(
    {
      studioId: column.key,
      kind: { ...column.text, primaryKey: true },
      material: { ...column.text, primaryKey: true },
      figures: column.json,
      note: column.textOrEmpty,
      revision: column.revision,
      setBy: column.uuid,
      updatedAt: column.now,
    },
    { sequelize, tableName: 'studio_figures' },
  );
}
