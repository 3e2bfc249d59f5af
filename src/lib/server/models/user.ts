import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Units } from '~/lib/contracts/common';

export class UserModel extends Model<InferAttributes<UserModel>, InferCreationAttributes<UserModel>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare email: string;
  declare temperatureUnit: CreationOptional<Units['temperature'] | null>;
  declare massUnit: CreationOptional<Units['mass'] | null>;
  declare lengthUnit: CreationOptional<Units['length'] | null>;
  declare theme: CreationOptional<'auto' | 'light' | 'dark'>;
  declare createdAt: CreationOptional<Date>;
}

export function initUser(sequelize: Sequelize): void {
  UserModel.init(
    {
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      name: { type: DataTypes.TEXT, allowNull: false },
      email: { type: DataTypes.TEXT, allowNull: false },
      temperatureUnit: { type: DataTypes.TEXT, allowNull: true },
      massUnit: { type: DataTypes.TEXT, allowNull: true },
      lengthUnit: { type: DataTypes.TEXT, allowNull: true },
      theme: { type: DataTypes.TEXT, allowNull: false, defaultValue: 'auto' },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'users' },
  );
}
