import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** An animal in a group. */
export class Enrolment extends Model<InferAttributes<Enrolment>, InferCreationAttributes<Enrolment>> {
  declare id: string;
  declare groupId: string;
  declare animalId: string;
  declare leftAt: CreationOptional<Date | null>;
  declare leftReason: CreationOptional<string | null>;

  static setup(sequelize: Sequelize): void {
    Enrolment.init(
      {
        id: column.id(),
        groupId: column.uuid(),
        animalId: column.uuid(),
        leftAt: column.instantOrNull(),
        leftReason: column.textOrNull(),
      },
      { sequelize, tableName: 'enrolments', timestamps: false, underscored: true },
    );
  }
}
