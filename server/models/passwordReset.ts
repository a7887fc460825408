import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A password reset; single use. */
export class PasswordReset extends Model<InferAttributes<PasswordReset>, InferCreationAttributes<PasswordReset>> {
  declare id: string;
  declare userId: string;
  declare tokenHash: string;
  declare expiresAt: Date;
  declare usedAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    PasswordReset.init(
      {
        id: column.id(),
        userId: column.uuid(),
        tokenHash: column.text(),
        expiresAt: column.instant(),
        usedAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'password_resets', timestamps: false, underscored: true },
    );
  }
}
