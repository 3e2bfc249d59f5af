import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

export class ClassRow extends Model<InferAttributes<ClassRow>, InferCreationAttributes<ClassRow>> {
  declare studioId: string;
  declare id: string;
  declare name: string;
  declare nameKey: CreationOptional<string>;
  declare term: string;
  declare teacherId: string;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare archivedAt: CreationOptional<Date | null>;
}

export class ClassMemberRow extends Model<
  InferAttributes<ClassMemberRow>,
  InferCreationAttributes<ClassMemberRow>
> {
  declare studioId: string;
  declare classId: string;
  declare userId: string;
}

export function initClasses(sequelize: Sequelize): void {
  ClassRow.init(
    {
      studioId: column.key,
      id: column.key,
      name: column.text,
      nameKey: column.maybeText,
      term: column.textOrEmpty,
      teacherId: column.uuid,
      revision: column.revision,
      createdAt: column.now,
      archivedAt: column.maybeInstant,
    },
    { sequelize, tableName: 'classes' },
  );
  ClassMemberRow.init(
    { studioId: column.key, classId: column.key, userId: column.key },
    { sequelize, tableName: 'class_members' },
  );
}
