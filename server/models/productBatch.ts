import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A batch of a product at a property. */
export class ProductBatch extends Model<InferAttributes<ProductBatch>, InferCreationAttributes<ProductBatch>> {
  declare id: string;
  declare propertyId: string;
  declare productId: string;
  declare number: string;
  declare expiry: string;
  declare quantity: number;
  declare broachedAt: CreationOptional<Date | null>;

  static setup(sequelize: Sequelize): void {
    ProductBatch.init(
      {
        id: column.id(),
        propertyId: column.uuid(),
        productId: column.uuid(),
        number: column.text(),
        expiry: column.date(),
        quantity: column.number(),
        broachedAt: column.instantOrNull(),
      },
      { sequelize, tableName: 'product_batches', timestamps: false, underscored: true },
    );
  }
}
