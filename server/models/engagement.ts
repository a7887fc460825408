import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** An organisation working at a property, for a scope and a time. */
export class Engagement extends Model<InferAttributes<Engagement>, InferCreationAttributes<Engagement>> {
  declare id: string;
  declare organisationId: string;
  declare propertyId: string;
  declare scope: 'veterinary' | 'insemination';
  declare fromDate: string;
  declare toDate: CreationOptional<string | null>;

  static setup(sequelize: Sequelize): void {
    Engagement.init(
      {
        id: column.id(),
        organisationId: column.uuid(),
        propertyId: column.uuid(),
        scope: column.text(),
        fromDate: column.date(),
        toDate: column.dateOrNull(),
      },
      { sequelize, tableName: 'engagements', timestamps: false, underscored: true },
    );
  }
}
