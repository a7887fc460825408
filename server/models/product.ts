import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { Active, AdministrationRoute, DoseUnit } from '@/protocols/types';
import * as column from './columns';

/** A medicine product of an organisation. */
export class Product extends Model<InferAttributes<Product>, InferCreationAttributes<Product>> {
  declare id: string;
  declare organisationId: string;
  declare name: string;
  declare active: Active;
  declare strength: number;
  declare unit: DoseUnit;
  declare per: 'mL' | 'piece' | 'g';
  declare packSize: CreationOptional<number | null>;
  declare route: AdministrationRoute;
  declare meatDays: CreationOptional<number | null>;
  declare milkHours: CreationOptional<number | null>;
  declare openDays: CreationOptional<number | null>;

  static setup(sequelize: Sequelize): void {
    Product.init(
      {
        id: column.id(),
        organisationId: column.uuid(),
        name: column.text(),
        active: column.text(),
        strength: column.number(),
        unit: column.text(),
        per: column.text(),
        packSize: column.numberOrNull(),
        route: column.text(),
        meatDays: column.numberOrNull(),
        milkHours: column.numberOrNull(),
        openDays: column.integerOrNull(),
      },
      { sequelize, tableName: 'products', timestamps: false, underscored: true },
    );
  }
}
