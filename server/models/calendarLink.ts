import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A secret calendar address of a person; only its hash is kept. */
export class CalendarLink extends Model<InferAttributes<CalendarLink>, InferCreationAttributes<CalendarLink>> {
  declare id: string;
  declare userId: string;
  declare label: string;
  declare propertyId: CreationOptional<string | null>;
  declare secretHash: string;
  declare createdAt: CreationOptional<Date>;
  declare revokedAt: CreationOptional<Date | null>;
  declare lastReadAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    CalendarLink.init(
      {
        id: column.id(),
        userId: column.uuid(),
        label: column.text(),
        propertyId: column.uuidOrNull(),
        secretHash: column.text(),
        createdAt: { ...column.instant(), allowNull: true },
        revokedAt: column.instantOrNull(),
        lastReadAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'calendar_links', timestamps: false, underscored: true },
    );
  }
}
