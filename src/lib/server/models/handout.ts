import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** An approved version given to a class or to people, for a kiln and a stretch of time. */
export class HandoutRow extends Model<InferAttributes<HandoutRow>, InferCreationAttributes<HandoutRow>> {
  declare studioId: string;
  declare id: string;
  declare profileVersionId: string;
  declare kilnId: string;
  declare classId: string | null;
  declare fromAt: Date;
  declare untilAt: Date;
  declare note: string;
  declare cautions: object[];
  declare handedOutById: string;
  declare createdAt: CreationOptional<Date>;
  declare withdrawnAt: CreationOptional<Date | null>;
  declare withdrawnReason: CreationOptional<string>;
  declare withdrawnById: CreationOptional<string | null>;
}

export class HandoutPersonRow extends Model<
  InferAttributes<HandoutPersonRow>,
  InferCreationAttributes<HandoutPersonRow>
> {
  declare studioId: string;
  declare handoutId: string;
  declare userId: string;
}

/** That somebody read the cautions of a handout, and how many there were. Only ever added to. */
export class HandoutAcknowledgementRow extends Model<
  InferAttributes<HandoutAcknowledgementRow>,
  InferCreationAttributes<HandoutAcknowledgementRow>
> {
  declare studioId: string;
  declare handoutId: string;
  declare userId: string;
  declare at: CreationOptional<Date>;
  declare cautions: number;
}

export function initHandouts(sequelize: Sequelize): void {
  HandoutRow.init(
    {
      studioId: column.key,
      id: column.key,
      profileVersionId: column.uuid,
      kilnId: column.uuid,
      classId: column.maybeUuid,
      fromAt: column.instant,
      untilAt: column.instant,
      note: column.textOrEmpty,
      cautions: column.json,
      handedOutById: column.uuid,
      createdAt: column.now,
      withdrawnAt: column.maybeInstant,
      withdrawnReason: column.textOrEmpty,
      withdrawnById: column.maybeUuid,
    },
    { sequelize, tableName: 'handouts' },
  );
  HandoutPersonRow.init(
    { studioId: column.key, handoutId: column.key, userId: column.key },
    { sequelize, tableName: 'handout_people' },
  );
  HandoutAcknowledgementRow.init(
    {
      studioId: column.key,
      handoutId: column.key,
      userId: column.key,
      at: column.now,
      cautions: column.whole,
    },
    { sequelize, tableName: 'handout_acknowledgements' },
  );
}
