import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { Active, AdministrationRoute, AnimalClass, DoseUnit } from '@/protocols/types';
import * as column from './columns';

/** A vet’s written direction for a medicine. */
export class Authority extends Model<InferAttributes<Authority>, InferCreationAttributes<Authority>> {
  declare id: string;
  declare propertyId: string;
  declare cohortId: CreationOptional<string | null>;
  declare organisationId: string;
  declare active: Active;
  declare productId: CreationOptional<string | null>;
  declare amount: number;
  declare unit: DoseUnit;
  declare route: AdministrationRoute;
  declare classes: AnimalClass[];
  declare head: number;
  declare validFrom: string;
  declare validTo: string;
  declare meatDays: CreationOptional<number | null>;
  declare milkHours: CreationOptional<number | null>;
  declare directions: CreationOptional<string>;
  declare issuedBy: string;
  declare issuedAt: CreationOptional<Date>;
  declare withdrawnAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    Authority.init(
      {
        id: column.id(),
        propertyId: column.uuid(),
        cohortId: column.uuidOrNull(),
        organisationId: column.uuid(),
        active: column.text(),
        productId: column.uuidOrNull(),
        amount: column.number(),
        unit: column.text(),
        route: column.text(),
        classes: column.texts(),
        head: column.integer(),
        validFrom: column.date(),
        validTo: column.date(),
        meatDays: column.numberOrNull(),
        milkHours: column.numberOrNull(),
        directions: { ...column.text(), allowNull: true },
        issuedBy: column.uuid(),
        issuedAt: { ...column.instant(), allowNull: true },
        withdrawnAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'authorities', timestamps: false, underscored: true },
    );
  }
}
