import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** What a record gave, step by step and item by item: the treatment register reads these. */
export class RecordStep extends Model<InferAttributes<RecordStep>, InferCreationAttributes<RecordStep>> {
  declare recordId: string;
  declare stepId: string;
  declare item: CreationOptional<number>;
  declare kind: string;
  declare outcome: 'done' | 'notDone' | 'lost' | 'withdrawn';
  declare reason: CreationOptional<string | null>;
  declare active: CreationOptional<string | null>;
  declare amount: CreationOptional<number | null>;
  declare unit: CreationOptional<string | null>;
  declare route: CreationOptional<string | null>;
  declare productBatchId: CreationOptional<string | null>;
  declare authorityId: CreationOptional<string | null>;

  static setup(sequelize: Sequelize): void {
    RecordStep.init(
      {
        recordId: { ...column.uuid(), primaryKey: true },
        stepId: { ...column.text(), primaryKey: true },
        item: { ...column.integer(), primaryKey: true, defaultValue: 0 },
        kind: column.text(),
        outcome: column.text(),
        reason: column.textOrNull(),
        active: column.textOrNull(),
        amount: column.numberOrNull(),
        unit: column.textOrNull(),
        route: column.textOrNull(),
        productBatchId: column.uuidOrNull(),
        authorityId: column.uuidOrNull(),
      },
      { sequelize, tableName: 'record_steps', timestamps: false, underscored: true },
    );
  }
}
