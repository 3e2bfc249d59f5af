import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** A thermocouple with its calibration: offsets by temperature. */
export class ThermocoupleRow extends Model<
  InferAttributes<ThermocoupleRow>,
  InferCreationAttributes<ThermocoupleRow>
> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare nameKey: CreationOptional<string>;
  declare type: string;
  declare toleranceClass: string;
  declare sheathM: number | null;
  declare maxC: number | null;
  declare calibration: object[];
  declare note: string;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export function initThermocouples(sequelize: Sequelize): void {
  ThermocoupleRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      nameKey: column.maybeText,
      type: column.text,
      toleranceClass: column.text,
      sheathM: column.maybeNumber,
      maxC: column.maybeNumber,
      calibration: column.json,
      note: column.textOrEmpty,
      revision: column.revision,
      createdAt: column.now,
      updatedAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'thermocouples' },
  );
}
