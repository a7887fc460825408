import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import type { ProtocolBody } from '@/protocols/types';
import * as column from './columns';

/** A version: a working copy, or signed off and then immutable. */
export class ProtocolVersion extends Model<InferAttributes<ProtocolVersion>, InferCreationAttributes<ProtocolVersion>> {
  declare id: string;
  declare protocolId: string;
  declare number: number;
  declare state: 'workingCopy' | 'signedOff' | 'retired';
  declare body: ProtocolBody;
  declare revision: CreationOptional<number>;
  declare signedBy: CreationOptional<string | null>;
  declare signedAt: CreationOptional<Date | null>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    ProtocolVersion.init(
      {
        id: column.id(),
        protocolId: column.uuid(),
        number: column.integer(),
        state: column.text(),
        body: column.json(),
        revision: { ...column.integer(), allowNull: true },
        signedBy: column.uuidOrNull(),
        signedAt: column.instantOrNull(),
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'protocol_versions', timestamps: false, underscored: true },
    );
  }
}
