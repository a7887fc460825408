import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A role of a person, in an organisation or at a property. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare id: string;
  declare userId: string;
  declare organisationId: CreationOptional<string | null>;
  declare propertyId: CreationOptional<string | null>;
  declare role: 'vet' | 'manager' | 'technician' | 'staff' | 'calendarOnly';
  declare endedAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    Membership.init(
      {
        id: column.id(),
        userId: column.uuid(),
        organisationId: column.uuidOrNull(),
        propertyId: column.uuidOrNull(),
        role: column.text(),
        endedAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'memberships', timestamps: false, underscored: true },
    );
  }
}
