import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { AnimalClass } from '@/protocols/types';
import * as column from './columns';

/** An animal of a property. */
export class Animal extends Model<InferAttributes<Animal>, InferCreationAttributes<Animal>> {
  declare id: string;
  declare propertyId: string;
  declare tag: string;
  declare eid: CreationOptional<string | null>;
  declare class: AnimalClass;
  declare breed: CreationOptional<string | null>;
  declare birth: CreationOptional<string | null>;
  declare sire: CreationOptional<string | null>;
  declare dam: CreationOptional<string | null>;
  declare lastCalving: CreationOptional<string | null>;
  declare lastService: CreationOptional<string | null>;
  declare knownEmpty: CreationOptional<boolean | null>;
  declare weightKg: CreationOptional<number | null>;
  declare condition: CreationOptional<number | null>;
  declare paddock: CreationOptional<string | null>;
  declare note: CreationOptional<string | null>;
  declare state: CreationOptional<'present' | 'left'>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    Animal.init(
      {
        id: column.id(),
        propertyId: column.uuid(),
        tag: column.text(),
        eid: column.textOrNull(),
        class: column.text(),
        breed: column.textOrNull(),
        birth: column.dateOrNull(),
        sire: column.textOrNull(),
        dam: column.textOrNull(),
        lastCalving: column.dateOrNull(),
        lastService: column.dateOrNull(),
        knownEmpty: column.boolOrNull(),
        weightKg: column.numberOrNull(),
        condition: column.numberOrNull(),
        paddock: column.textOrNull(),
        note: column.textOrNull(),
        state: { ...column.text(), allowNull: true },
        createdAt: { ...column.instant(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'animals', timestamps: false, underscored: true },
    );
  }
}
