import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** What energy costs: one price, or prices by local time of use. */
export class TariffRow extends Model<InferAttributes<TariffRow>, InferCreationAttributes<TariffRow>> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare nameKey: CreationOptional<string>;
  declare currency: string;
  declare energy: string;
  declare per: string;
  /** A decimal string: the database keeps the digits that were typed. */
  declare price: string;
  declare bands: object[];
  declare co2KgPerKWh: number | null;
  declare co2Source: string;
  declare note: string;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initTariffs(sequelize: Sequelize): void {
  TariffRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      nameKey: column.maybeText,
      currency: column.text,
      energy: column.text,
      per: column.text,
      price: { type: DataTypes.DECIMAL, allowNull: false },
      bands: column.json,
      co2KgPerKWh: { ...column.maybeNumber, field: 'co2_kg_per_kwh' },
      co2Source: column.textOrEmpty,
      note: column.textOrEmpty,
      revision: column.revision,
      createdAt: column.now,
      updatedAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'tariffs' },
  );
}
