import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';
import type { OutboxChannel, OutboxState } from '@/lib/domain/states';

/** Something to send to the outside, with its attempts. */
export class OutboxMessageModel extends Model<
  InferAttributes<OutboxMessageModel>,
  InferCreationAttributes<OutboxMessageModel>
> {
  declare id: CreationOptional<string>;
  declare channel: OutboxChannel;
  declare dedupeKey: string;
  declare payload: JsonObject;
  declare state: OutboxState;
  declare attempts: CreationOptional<number>;
  declare nextAttemptAt: Date;
  declare lastError: CreationOptional<string | null>;
  declare sentAt: CreationOptional<Date | null>;
  declare subjectType: CreationOptional<string | null>;
  declare subjectId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    OutboxMessageModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        channel: { type: DataTypes.STRING, allowNull: false },
        dedupeKey: { type: DataTypes.STRING, allowNull: false, unique: true },
        payload: { type: DataTypes.JSON, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        attempts: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        nextAttemptAt: { type: DataTypes.DATE, allowNull: false },
        lastError: { type: DataTypes.TEXT, defaultValue: null },
        sentAt: { type: DataTypes.DATE, defaultValue: null },
        subjectType: { type: DataTypes.STRING, defaultValue: null },
        subjectId: { type: DataTypes.STRING, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'OutboxMessage', tableName: 'outbox_messages' },
    );
  }
}
