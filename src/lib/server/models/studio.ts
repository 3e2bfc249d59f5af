import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Units } from '~/lib/contracts/common';

export class StudioModel extends Model<InferAttributes<StudioModel>, InferCreationAttributes<StudioModel>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare timeZone: string;
  declare temperatureUnit: CreationOptional<Units['temperature']>;
  declare massUnit: CreationOptional<Units['mass']>;
  declare lengthUnit: CreationOptional<Units['length']>;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
}

export function initStudio(sequelize: Sequelize): void {
  StudioModel.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      timeZone: { type: DataTypes.TEXT, allowNull: false },
      temperatureUnit: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'C' },
      massUnit: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'kg' },
      lengthUnit: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'mm' },
      revision: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'studios' },
  );
}
