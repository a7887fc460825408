import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** One act on one animal or on a number of head; append-only. */
export class WorkRecord extends Model<InferAttributes<WorkRecord>, InferCreationAttributes<WorkRecord>> {
  declare id: string;
  declare taskId: string;
  declare propertyId: string;
  declare animalId: CreationOptional<string | null>;
  declare head: CreationOptional<number>;
  declare outcome: 'done' | 'notDone' | 'lost' | 'withdrawn' | 'undone';
  declare reason: CreationOptional<string | null>;
  declare observed: CreationOptional<Record<string, string>>;
  declare at: Date;
  declare receivedAt: CreationOptional<Date>;
  declare userId: string;
  declare directionUserId: CreationOptional<string | null>;
  declare correctsId: CreationOptional<string | null>;
  declare note: CreationOptional<string | null>;

  static setup(sequelize: Sequelize): void {
    WorkRecord.init(
      {
        id: column.id(),
        taskId: column.uuid(),
        propertyId: column.uuid(),
        animalId: column.uuidOrNull(),
        head: { ...column.integer(), allowNull: true },
        outcome: column.text(),
        reason: column.textOrNull(),
        observed: { ...column.json(), allowNull: true },
        at: column.instant(),
        receivedAt: { ...column.instant(), allowNull: true },
        userId: column.uuid(),
        directionUserId: column.uuidOrNull(),
        correctsId: column.uuidOrNull(),
        note: column.textOrNull(),
      },
      { sequelize, tableName: 'records', timestamps: false, underscored: true },
    );
  }
}
