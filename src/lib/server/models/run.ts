import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

const nullableUuid = { type: DataTypes.UUID, allowNull: true };
const nullableDate = { type: DataTypes.DATE, allowNull: true };
const shortText = { type: DataTypes.TEXT, allowNull: false, defaultValue: '' };

export class RunRow extends Model<InferAttributes<RunRow>, InferCreationAttributes<RunRow>> {
  declare studioId: string;
  declare id: string;
  declare number: number;
  declare state: string;
  declare revision: CreationOptional<number>;
  declare kilnId: string;
  declare profileVersionId: string;
  declare handoutId: string | null;
  declare load: object | null;
  declare frozen: object | null;
  declare plannedStartAt: Date;
  declare startedAt: Date | null;
  declare finishedAt: Date | null;
  declare closedAt: Date | null;
  declare brokenOffReason: CreationOptional<string>;
  declare note: CreationOptional<string>;
  declare currentLogId: string | null;
  declare signedOffBy: string | null;
  declare signOffRemark: CreationOptional<string>;
  declare createdBy: string;
  declare createdAt: CreationOptional<Date>;
}

export class RunCounterRow extends Model<
  InferAttributes<RunCounterRow>,
  InferCreationAttributes<RunCounterRow>
> {
  declare studioId: string;
  declare lastNumber: number;
}

export class RunRecorderRow extends Model<
  InferAttributes<RunRecorderRow>,
  InferCreationAttributes<RunRecorderRow>
> {
  declare studioId: string;
  declare runId: string;
  declare userId: string;
}

export function initRuns(sequelize: Sequelize): void {
  RunRow.init(
    {
      studioId: { type: DataTypes.UUID, primaryKey: true },
      id: { type: DataTypes.UUID, primaryKey: true },
      number: { type: DataTypes.INTEGER, allowNull: false },
      state: { type: DataTypes.TEXT, allowNull: false },
      revision: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      kilnId: { type: DataTypes.UUID, allowNull: false },
      profileVersionId: { type: DataTypes.UUID, allowNull: false },
      handoutId: nullableUuid,
      load: { type: DataTypes.JSONB, allowNull: true },
      frozen: { type: DataTypes.JSONB, allowNull: true },
      plannedStartAt: { type: DataTypes.DATE, allowNull: false },
      startedAt: nullableDate,
      finishedAt: nullableDate,
      closedAt: nullableDate,
      brokenOffReason: shortText,
      note: shortText,
      currentLogId: nullableUuid,
      signedOffBy: nullableUuid,
      signOffRemark: shortText,
      createdBy: { type: DataTypes.UUID, allowNull: false },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'runs' },
  );
  RunCounterRow.init(
    {
      studioId: { type: DataTypes.UUID, primaryKey: true },
      lastNumber: { type: DataTypes.INTEGER, allowNull: false },
    },
    { sequelize, tableName: 'run_counters' },
  );
  RunRecorderRow.init(
    {
      studioId: { type: DataTypes.UUID, primaryKey: true },
      runId: { type: DataTypes.UUID, primaryKey: true },
      userId: { type: DataTypes.UUID, primaryKey: true },
    },
    { sequelize, tableName: 'run_recorders' },
  );
}
