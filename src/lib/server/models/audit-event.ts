import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class AuditEventModel extends Model<
  InferAttributes<AuditEventModel>,
  InferCreationAttributes<AuditEventModel>
> {
  declare studioId: string;
  declare id: CreationOptional<string>;
  declare at: CreationOptional<Date>;
  declare actorId: string | null;
  declare what: string;
  declare subjectKind: string;
  declare subjectId: string | null;
  declare detail: CreationOptional<Record<string, unknown>>;
}

export function initAuditEvent(sequelize: Sequelize): void {
  AuditEventModel.init(
    {
      studioId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
      at: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
      actorId: { type: DataTypes.UUID, allowNull: true },
      what: { type: DataTypes.TEXT, allowNull: false },
      subjectKind: { type: DataTypes.TEXT, allowNull: false },
      subjectId: { type: DataTypes.UUID, allowNull: true },
      detail: { type: DataTypes.JSONB, allowNull: false, defaultValue: {} },
    },
    { sequelize, tableName: 'audit_events' },
  );
}
