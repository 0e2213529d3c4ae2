import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';

/** One line of the append-only record; each hash covers the line before. */
export class RecordEntryModel extends Model<
  InferAttributes<RecordEntryModel>,
  InferCreationAttributes<RecordEntryModel>
> {
  declare seq: CreationOptional<number>;
  declare at: string;
  declare actorId: CreationOptional<string | null>;
  declare actorName: string;
  declare subjectType: string;
  declare subjectId: string;
  declare subjectLabel: string;
  declare action: string;
  declare fromState: CreationOptional<string | null>;
  declare toState: CreationOptional<string | null>;
  declare reason: CreationOptional<string | null>;
  declare detail: JsonObject;
  declare previousHash: string;
  declare hash: string;

  static define(sequelize: Sequelize): void {
    RecordEntryModel.init(
      {
        seq: { type: DataTypes.INTEGER, primaryKey: true, autoIncrement: true, allowNull: false },
        at: { type: DataTypes.STRING, allowNull: false },
        actorId: { type: DataTypes.UUID, defaultValue: null },
        actorName: { type: DataTypes.STRING, allowNull: false },
        subjectType: { type: DataTypes.STRING, allowNull: false },
        subjectId: { type: DataTypes.STRING, allowNull: false },
        subjectLabel: { type: DataTypes.STRING, allowNull: false },
        action: { type: DataTypes.STRING, allowNull: false },
        fromState: { type: DataTypes.STRING, defaultValue: null },
        toState: { type: DataTypes.STRING, defaultValue: null },
        reason: { type: DataTypes.TEXT, defaultValue: null },
        detail: { type: DataTypes.JSON, allowNull: false },
        previousHash: { type: DataTypes.STRING, allowNull: false },
        hash: { type: DataTypes.STRING, allowNull: false, unique: true },
      },
      { sequelize, modelName: 'RecordEntry', tableName: 'record_entries', timestamps: false },
    );
  }
}
