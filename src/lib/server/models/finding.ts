import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

const key = { type: DataTypes.UUID, primaryKey: true };
const nullableUuid = { type: DataTypes.UUID, allowNull: true };
const text = { type: DataTypes.TEXT, allowNull: false, defaultValue: '' };
const number = { type: DataTypes.DOUBLE, allowNull: false };
const maybe = { type: DataTypes.DOUBLE, allowNull: true };

/** A deviation in a log: computed by the review, or marked by a person. */
export class FindingRow extends Model<InferAttributes<FindingRow>, InferCreationAttributes<FindingRow>> {
  declare studioId: string;
  declare id: string;
  declare runId: string;
  declare logId: string | null;
  declare revision: CreationOptional<number>;
  declare kind: string;
  declare severity: string;
  declare origin: string;
  declare state: CreationOptional<string>;
  declare channelId: string | null;
  declare segment: number | null;
  declare startS: number;
  declare endS: number;
  declare peakC: number | null;
  declare byC: number | null;
  declare byS: number | null;
  declare byCPerH: number | null;
  declare holdLostS: number | null;
  declare expected: CreationOptional<boolean>;
  declare text: CreationOptional<string>;
  declare remark: CreationOptional<string>;
  declare followUp: object | null;
  declare decidedBy: string | null;
  declare decidedAt: Date | null;
  declare createdAt: CreationOptional<Date>;
}

export function initFindings(sequelize: Sequelize): void {
  FindingRow.init(
    {
      studioId: key,
      id: key,
      runId: { type: DataTypes.UUID, allowNull: false },
      logId: nullableUuid,
      revision: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
      kind: text,
      severity: text,
      origin: text,
      state: { ...text, defaultValue: 'open' },
      channelId: nullableUuid,
      segment: { type: DataTypes.SMALLINT, allowNull: true },
      startS: number,
      endS: number,
      peakC: maybe,
      byC: maybe,
      byS: maybe,
      byCPerH: maybe,
      holdLostS: maybe,
      expected: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
      text,
      remark: text,
      followUp: { type: DataTypes.JSONB, allowNull: true },
      decidedBy: nullableUuid,
      decidedAt: { type: DataTypes.DATE, allowNull: true },
      createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    },
    { sequelize, tableName: 'findings' },
  );
}
