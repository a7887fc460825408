import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A farm that owns its data; its zone rules every local time. */
export class Property extends Model<InferAttributes<Property>, InferCreationAttributes<Property>> {
  declare id: string;
  declare name: string;
  declare zone: string;
  declare country: string;
  declare region: CreationOptional<string | null>;
  declare locale: CreationOptional<string>;
  declare latitude: CreationOptional<number | null>;
  declare longitude: CreationOptional<number | null>;
  declare yardFrom: CreationOptional<string | null>;
  declare yardTo: CreationOptional<string | null>;
  declare milkings: CreationOptional<string[]>;
  declare weekendDays: CreationOptional<number[]>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    Property.init(
      {
        id: column.id(),
        name: column.text(),
        zone: column.text(),
        country: column.text(),
        region: column.textOrNull(),
        locale: { ...column.text(), allowNull: true },
        latitude: column.numberOrNull(),
        longitude: column.numberOrNull(),
        yardFrom: column.clockOrNull(),
        yardTo: column.clockOrNull(),
        milkings: { ...column.texts(), allowNull: true },
        weekendDays: { ...column.integers(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'properties', timestamps: false, underscored: true },
    );
  }
}
