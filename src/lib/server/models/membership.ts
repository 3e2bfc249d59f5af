import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Role } from '~/lib/contracts/common';

export class MembershipModel extends Model<
  InferAttributes<MembershipModel>,
  InferCreationAttributes<MembershipModel>
> {
  declare studioId: string;
  declare userId: string;
  declare roles: Role[];
  declare createdAt: CreationOptional<Date>;
  declare endedAt: CreationOptional<Date | null>;
}

export function initMembership(sequelize: Sequelize): void {
  MembershipModel.init(
    {
      studioId: { type: DataTypes.UUID, primaryKey: true },
      userId: { type: DataTypes.UUID, primaryKey: true },
      roles: { type: DataTypes.ARRAY(DataTypes.TEXT), allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      endedAt: { type: DataTypes.DATE, allowNull: true },
    },
    { sequelize, tableName: 'memberships' },
  );
}
