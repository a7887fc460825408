import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** An invitation by e-mail; only the hash of its token is kept. */
export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare id: string;
  declare email: string;
  declare role: 'vet' | 'manager' | 'technician' | 'staff' | 'calendarOnly';
  declare propertyId: CreationOptional<string | null>;
  declare organisationId: CreationOptional<string | null>;
  declare tokenHash: string;
  declare invitedBy: string;
  declare expiresAt: Date;
  declare acceptedAt: CreationOptional<Date | null>;
  declare withdrawnAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    Invitation.init(
      {
        id: column.id(),
        email: column.text(),
        role: column.text(),
        propertyId: column.uuidOrNull(),
        organisationId: column.uuidOrNull(),
        tokenHash: column.text(),
        invitedBy: column.uuid(),
        expiresAt: column.instant(),
        acceptedAt: column.instantOrNull(),
        withdrawnAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'invitations', timestamps: false, underscored: true },
    );
  }
}
