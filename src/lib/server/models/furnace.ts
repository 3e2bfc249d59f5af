import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** A melting furnace. Columns of the other energy are null. */
export class FurnaceRow extends Model<InferAttributes<FurnaceRow>, InferCreationAttributes<FurnaceRow>> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare nameKey: CreationOptional<string>;
  declare energy: string;
  declare efficiencyShare: number | null;
  declare capacityKg: number;
  declare maxC: number;
  declare ratedKW: number | null;
  declare burnerKW: number | null;
  declare fuel: string | null;
  declare tariffId: string | null;
  declare note: string;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initFurnaces(sequelize: Sequelize): void {
  FurnaceRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      nameKey: column.maybeText,
      energy: column.text,
      efficiencyShare: column.maybeNumber,
      capacityKg: column.number,
      maxC: column.number,
      ratedKW: { ...column.maybeNumber, field: 'rated_kw' },
      burnerKW: { ...column.maybeNumber, field: 'burner_kw' },
      fuel: column.maybeText,
      tariffId: column.maybeUuid,
      note: column.textOrEmpty,
      revision: column.revision,
      createdAt: column.now,
      updatedAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'furnaces' },
  );
}
