import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class CredentialModel extends Model<
  InferAttributes<CredentialModel>,
  InferCreationAttributes<CredentialModel>
> {
  declare userId: string;
  declare passwordHash: string;
  declare changedAt: CreationOptional<Date>;
}

export function initCredential(sequelize: Sequelize): void {
  CredentialModel.init(
    {
      userId: { type: DataTypes.UUID, primaryKey: true },
      passwordHash: { type: DataTypes.TEXT, allowNull: false },
      changedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'credentials' },
  );
}
