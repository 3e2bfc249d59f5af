import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

const uuid = { type: DataTypes.UUID, allowNull: false };
const text = { type: DataTypes.TEXT, allowNull: false };
const integer = { type: DataTypes.INTEGER, allowNull: false };
const createdAt = { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW };
const key = { type: DataTypes.UUID, primaryKey: true };

/** A file as it came. */
export class UploadRow extends Model<InferAttributes<UploadRow>, InferCreationAttributes<UploadRow>> {
  declare studioId: string;
  declare id: string;
  declare runId: string;
  declare fileName: string;
  declare bytes: number;
  declare sha256: string;
  declare uploadedBy: string;
  declare createdAt: CreationOptional<Date>;
}

export class UploadPartRow extends Model<
  InferAttributes<UploadPartRow>,
  InferCreationAttributes<UploadPartRow>
> {
  declare studioId: string;
  declare uploadId: string;
  declare part: number;
  declare data: Buffer;
}

/** One reading of a kept file. */
export class LogRow extends Model<InferAttributes<LogRow>, InferCreationAttributes<LogRow>> {
  declare studioId: string;
  declare id: string;
  declare runId: string;
  declare uploadId: string;
  declare revision: CreationOptional<number>;
  declare mappingKey: string;
  declare report: object;
  declare alignment: object;
  declare review: object;
  declare createdBy: string;
  declare createdAt: CreationOptional<Date>;
}

export class LogChannelRow extends Model<
  InferAttributes<LogChannelRow>,
  InferCreationAttributes<LogChannelRow>
> {
  declare studioId: string;
  declare id: string;
  declare logId: string;
  declare position: number;
  declare name: string;
  declare quantity: string;
  declare role: string;
  declare unit: string;
}

export class SampleChunkRow extends Model<
  InferAttributes<SampleChunkRow>,
  InferCreationAttributes<SampleChunkRow>
> {
  declare studioId: string;
  declare logId: string;
  declare level: number;
  declare chunk: number;
  declare fromMs: number;
  declare toMs: number;
  declare rows: number;
  declare data: Buffer;
}

export function initLogs(sequelize: Sequelize): void {
  UploadRow.init(
    {
      studioId: key,
      id: key,
      runId: uuid,
      fileName: text,
      bytes: { type: DataTypes.BIGINT, allowNull: false },
      sha256: text,
      uploadedBy: uuid,
      createdAt,
    },
    { sequelize, tableName: 'uploads' },
  );
  UploadPartRow.init(
    {
      studioId: key,
      uploadId: key,
      part: { type: DataTypes.INTEGER, primaryKey: true },
      data: { type: DataTypes.BLOB, allowNull: false },
    },
    { sequelize, tableName: 'upload_parts' },
  );
  const document = { type: DataTypes.JSONB, allowNull: false };
  LogRow.init(
    {
      studioId: key,
      id: key,
      runId: uuid,
      uploadId: uuid,
      revision: { ...integer, defaultValue: 1 },
      mappingKey: text,
      report: document,
      alignment: document,
      review: document,
      createdBy: uuid,
      createdAt,
    },
    { sequelize, tableName: 'logs' },
  );
  LogChannelRow.init(
    {
      studioId: key,
      id: key,
      logId: uuid,
      position: integer,
      name: text,
      quantity: text,
      role: text,
      unit: text,
    },
    { sequelize, tableName: 'log_channels' },
  );
  SampleChunkRow.init(
    {
      studioId: key,
      logId: key,
      level: { type: DataTypes.SMALLINT, primaryKey: true },
      chunk: { type: DataTypes.INTEGER, primaryKey: true },
      fromMs: { type: DataTypes.DOUBLE, allowNull: false },
      toMs: { type: DataTypes.DOUBLE, allowNull: false },
      rows: integer,
      data: { type: DataTypes.BLOB, allowNull: false },
    },
    { sequelize, tableName: 'sample_chunks' },
  );
}
