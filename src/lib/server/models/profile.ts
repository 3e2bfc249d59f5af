import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

export class ProfileRow extends Model<InferAttributes<ProfileRow>, InferCreationAttributes<ProfileRow>> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare authorId: string;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

/** The content of one version. A trigger keeps it from changing once it is no draft. */
export class ProfileVersionRow extends Model<
  InferAttributes<ProfileVersionRow>,
  InferCreationAttributes<ProfileVersionRow>
> {
  declare studioId: string;
  declare id: string;
  declare profileId: string;
  declare number: number;
  declare authorId: string;
  declare editedById: string;
  declare profile: object;
  declare kilnId: string | null;
  declare load: object | null;
  declare sha256: string;
  declare createdAt: CreationOptional<Date>;
}

/** The state of a version, beside its content. */
export class VersionStateRow extends Model<
  InferAttributes<VersionStateRow>,
  InferCreationAttributes<VersionStateRow>
> {
  declare studioId: string;
  declare versionId: string;
  declare state: string;
  declare revision: CreationOptional<number>;
}

/** What was done with a version, by whom, with which words. Only ever added to. */
export class VersionEventRow extends Model<
  InferAttributes<VersionEventRow>,
  InferCreationAttributes<VersionEventRow>
> {
  declare studioId: string;
  declare id: string;
  declare versionId: string;
  declare what: string;
  declare at: CreationOptional<Date>;
  declare byId: string;
  declare note: string;
  declare overrides: object[];
  declare segmentRemarks: object[];
}

export function initProfiles(sequelize: Sequelize): void {
  ProfileRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      authorId: column.uuid,
      revision: column.revision,
      createdAt: column.now,
      updatedAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'profiles' },
  );
  ProfileVersionRow.init(
    {
      studioId: column.key,
      id: column.key,
      profileId: column.uuid,
      number: column.whole,
      authorId: column.uuid,
      editedById: column.uuid,
      profile: column.json,
      kilnId: column.maybeUuid,
      load: column.maybeJson,
      sha256: { type: DataTypes.TEXT, allowNull: false, field: 'sha256' },
      createdAt: column.now,
    },
    { sequelize, tableName: 'profile_versions' },
  );
  VersionStateRow.init(
    { studioId: column.key, versionId: column.key, state: column.text, revision: column.revision },
    { sequelize, tableName: 'version_states' },
  );
  VersionEventRow.init(
    {
      studioId: column.key,
      id: column.key,
      versionId: column.uuid,
      what: column.text,
      at: column.now,
      byId: column.uuid,
      note: column.textOrEmpty,
      overrides: column.json,
      segmentRemarks: column.json,
    },
    { sequelize, tableName: 'version_events' },
  );
}
