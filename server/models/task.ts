import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { TaskStep } from '@/shared/contracts/cohorts';
import * as column from './columns';

/** One visit of one group: what people see. Made by expanding once, changed only by replanning. */
export class Task extends Model<InferAttributes<Task>, InferCreationAttributes<Task>> {
  declare id: string;
  declare cohortId: string;
  declare groupId: string;
  declare propertyId: string;
  declare visitId: string;
  declare occurrence: CreationOptional<number>;
  declare title: string;
  declare yarded: boolean;
  declare dueAt: Date;
  declare windowFrom: Date;
  declare windowTo: Date;
  declare zone: string;
  declare sinceAnchorMinutes: CreationOptional<number | null>;
  declare anchorLabel: CreationOptional<string | null>;
  declare steps: TaskStep[];
  declare state: CreationOptional<'planned' | 'inWork' | 'done' | 'cancelled'>;
  declare movedFrom: CreationOptional<Date | null>;
  declare revision: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    Task.init(
      {
        id: column.id(),
        cohortId: column.uuid(),
        groupId: column.uuid(),
        propertyId: column.uuid(),
        visitId: column.text(),
        occurrence: { ...column.integer(), allowNull: true },
        title: column.text(),
        yarded: column.bool(),
        dueAt: column.instant(),
        windowFrom: column.instant(),
        windowTo: column.instant(),
        zone: column.text(),
        sinceAnchorMinutes: column.integerOrNull(),
        anchorLabel: column.textOrNull(),
        steps: column.json(),
        state: { ...column.text(), allowNull: true },
        movedFrom: column.instantOrNull(),
        revision: { ...column.integer(), allowNull: true },
        createdAt: { ...column.instant(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'tasks', timestamps: false, underscored: true },
    );
  }
}
