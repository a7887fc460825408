import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A person with a password and wishes about reminders. */
export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: string;
  declare email: string;
  declare name: string;
  declare passwordHash: string;
  declare remindEvening: CreationOptional<boolean>;
  declare remindMorning: CreationOptional<boolean>;
  declare remindClosing: CreationOptional<boolean>;
  declare eveningAt: CreationOptional<string>;
  declare morningAt: CreationOptional<string>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    User.init(
      {
        id: column.id(),
        email: column.text(),
        name: column.text(),
        passwordHash: column.text(),
        remindEvening: { ...column.bool(), allowNull: true },
        remindMorning: { ...column.bool(), allowNull: true },
        remindClosing: { ...column.bool(), allowNull: true },
        eveningAt: { ...column.clock(), allowNull: true },
        morningAt: { ...column.clock(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'users', timestamps: false, underscored: true },
    );
  }
}
