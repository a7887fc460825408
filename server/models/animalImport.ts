import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A committed import: its id makes a repeat harmless. */
export class AnimalImport extends Model<InferAttributes<AnimalImport>, InferCreationAttributes<AnimalImport>> {
  declare id: string;
  declare propertyId: string;
  declare userId: string;
  declare fileName: string;
  declare fileHash: string;
  declare counts: { create: number; update: number; skip: number; refuse: number };
  declare animalIds: string[];
  declare createdAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    AnimalImport.init(
      {
        id: column.id(),
        propertyId: column.uuid(),
        userId: column.uuid(),
        fileName: column.text(),
        fileHash: column.text(),
        counts: column.json(),
        animalIds: column.uuids(),
        createdAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'animal_imports', timestamps: false, underscored: true },
    );
  }
}
