import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** One try to deliver a message. */
export class DeliveryAttempt extends Model<InferAttributes<DeliveryAttempt>, InferCreationAttributes<DeliveryAttempt>> {
  declare id: string;
  declare messageId: string;
  declare at: CreationOptional<Date>;
  declare ok: boolean;
  declare answer: CreationOptional<string>;

  static setup(sequelize: Sequelize): void {
    DeliveryAttempt.init(
      {
        id: column.id(),
        messageId: column.uuid(),
        at: { ...column.instant(), allowNull: true },
        ok: column.bool(),
        answer: { ...column.text(), allowNull: true },
      },
      { sequelize, tableName: 'delivery_attempts', timestamps: false, underscored: true },
    );
  }
}
