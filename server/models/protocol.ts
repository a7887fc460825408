import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A protocol of an organisation; its versions hold the recipe. */
export class Protocol extends Model<InferAttributes<Protocol>, InferCreationAttributes<Protocol>> {
  declare id: string;
  declare organisationId: string;
  declare name: string;
  declare libraryId: CreationOptional<string | null>;
  declare createdBy: string;

  static setup(sequelize: Sequelize): void {
    Protocol.init(
      {
        id: column.id(),
        organisationId: column.uuid(),
        name: column.text(),
        libraryId: column.textOrNull(),
        createdBy: column.uuid(),
      },
      { sequelize, tableName: 'protocols', timestamps: false, underscored: true },
    );
  }
}
