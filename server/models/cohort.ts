import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { Finding } from '@/protocols/types';
import * as column from './columns';

/** Animals started together on one protocol version. */
export class Cohort extends Model<InferAttributes<Cohort>, InferCreationAttributes<Cohort>> {
  declare id: string;
  declare propertyId: string;
  declare name: string;
  declare state: CreationOptional<'planning' | 'running' | 'finished' | 'cancelled'>;
  declare protocolVersionId: CreationOptional<string | null>;
  declare options: CreationOptional<Record<string, string>>;
  declare anchorVisit: CreationOptional<string | null>;
  declare anchorLocal: CreationOptional<string | null>;
  declare zone: string;
  declare findings: CreationOptional<Finding[]>;
  declare revision: CreationOptional<number>;
  declare createdBy: string;
  declare startedBy: CreationOptional<string | null>;
  declare startedAt: CreationOptional<Date | null>;
  declare cancelledAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    Cohort.init(
      {
        id: column.id(),
        propertyId: column.uuid(),
        name: column.text(),
        state: { ...column.text(), allowNull: true },
        protocolVersionId: column.uuidOrNull(),
        options: { ...column.json(), allowNull: true },
        anchorVisit: column.textOrNull(),
        anchorLocal: column.localOrNull(),
        zone: column.text(),
        findings: { ...column.json(), allowNull: true },
        revision: { ...column.integer(), allowNull: true },
        createdBy: column.uuid(),
        startedBy: column.uuidOrNull(),
        startedAt: column.instantOrNull(),
        cancelledAt: column.instantOrNull(),
        createdAt: { ...column.instant(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'cohorts', timestamps: false, underscored: true },
    );
  }
}
