import { Model, type InferAttributes, type InferCreationAttributes, type Sequelize } from 'sequelize';

import * as column from './columns';

/** A vet practice or an AI contractor. */
export class Organisation extends Model<InferAttributes<Organisation>, InferCreationAttributes<Organisation>> {
  declare id: string;
  declare name: string;
  declare kind: 'vetPractice' | 'aiContractor';

  static setup(sequelize: Sequelize): void {
    Organisation.init(
      {
        id: column.id(),
        name: column.text(),
        kind: column.text(),
      },
      { sequelize, tableName: 'organisations', timestamps: false, underscored: true },
    );
  }
}
