import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** What was changed, by whom; never changed itself. */
export class AuditEntry extends Model<InferAttributes<AuditEntry>, InferCreationAttributes<AuditEntry>> {
  declare id: string;
  declare at: CreationOptional<Date>;
  declare userId: CreationOptional<string | null>;
  declare propertyId: CreationOptional<string | null>;
  declare organisationId: CreationOptional<string | null>;
  declare cohortId: CreationOptional<string | null>;
  declare action: string;
  declare summary: string;
  declare detail: CreationOptional<Record<string, unknown>>;

  static setup(sequelize: Sequelize): void {
    AuditEntry.init(
      {
        id: column.id(),
        at: { ...column.instant(), allowNull: true },
        userId: column.uuidOrNull(),
        propertyId: column.uuidOrNull(),
        organisationId: column.uuidOrNull(),
        cohortId: column.uuidOrNull(),
        action: column.text(),
        summary: column.text(),
        detail: { ...column.json(), allowNull: true },
      },
      { sequelize, tableName: 'audit_entries', timestamps: false, underscored: true },
    );
  }
}
