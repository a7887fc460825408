import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

import * as column from './columns';

/** A row of the outbox. */
export class Message extends Model<InferAttributes<Message>, InferCreationAttributes<Message>> {
  declare id: string;
  declare dedupeKey: string;
  declare channel: 'email';
  declare kind: 'evening' | 'morning' | 'closing' | 'invitation' | 'passwordReset' | 'planChanged';
  declare userId: CreationOptional<string | null>;
  declare address: string;
  declare taskId: CreationOptional<string | null>;
  declare propertyId: CreationOptional<string | null>;
  declare params: CreationOptional<Record<string, unknown>>;
  declare dueAt: Date;
  declare staleAt: CreationOptional<Date | null>;
  declare state: CreationOptional<'waiting' | 'sent' | 'withdrawn' | 'failed'>;
  declare attempts: CreationOptional<number>;
  declare nextTryAt: Date;
  declare claimedUntil: CreationOptional<Date | null>;
  declare claimedBy: CreationOptional<string | null>;
  declare sentAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static setup(sequelize: Sequelize): void {
    Message.init(
      {
        id: column.id(),
        dedupeKey: column.text(),
        channel: { ...column.text(), allowNull: true },
        kind: column.text(),
        userId: column.uuidOrNull(),
        address: column.text(),
        taskId: column.uuidOrNull(),
        propertyId: column.uuidOrNull(),
        params: { ...column.json(), allowNull: true },
        dueAt: column.instant(),
        staleAt: column.instantOrNull(),
        state: { ...column.text(), allowNull: true },
        attempts: { ...column.integer(), allowNull: true },
        nextTryAt: column.instant(),
        claimedUntil: column.instantOrNull(),
        claimedBy: column.textOrNull(),
        sentAt: column.instantOrNull(),
        createdAt: { ...column.instant(), allowNull: true },
        updatedAt: { ...column.instant(), allowNull: true },
      },
      { sequelize, tableName: 'messages', timestamps: false, underscored: true },
    );
  }
}
