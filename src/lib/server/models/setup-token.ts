import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class SetupTokenModel extends Model<
  InferAttributes<SetupTokenModel>,
  InferCreationAttributes<SetupTokenModel>
> {
  declare tokenHash: string;
  declare createdAt: CreationOptional<Date>;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;
}

export function initSetupToken(sequelize: Sequelize): void {
  SetupTokenModel.init(
    {
      tokenHash: { type: DataTypes.TEXT, primaryKey: true },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      expiresAt: { type: DataTypes.DATE, allowNull: false },
      usedAt: { type: DataTypes.DATE, allowNull: true },
    },
    { sequelize, tableName: 'setup_tokens' },
  );
}
