import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { AnimalClass } from '@/protocols/types';
import * as column from './columns';

/** The part of a cohort that goes through the yards together. */
export class Group extends Model<InferAttributes<Group>, InferCreationAttributes<Group>> {
  declare id: string;
  declare cohortId: string;
  declare position: number;
  declare name: string;
  declare class: AnimalClass;
  declare headOnly: CreationOptional<number | null>;
  declare anchorLocal: CreationOptional<string | null>;

  static setup(sequelize: Sequelize): void {
    Group.init(
      {
        id: column.id(),
        cohortId: column.uuid(),
        position: column.integer(),
        name: column.text(),
        class: column.text(),
        headOnly: column.integerOrNull(),
        anchorLocal: column.localOrNull(),
      },
      { sequelize, tableName: 'groups', timestamps: false, underscored: true },
    );
  }
}
