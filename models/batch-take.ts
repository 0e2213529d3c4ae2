import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';

/** What is taken from which lot, planned and actual. */
export class BatchTakeModel extends Model<
  InferAttributes<BatchTakeModel>,
  InferCreationAttributes<BatchTakeModel>
> {
  declare id: CreationOptional<string>;
  declare batchId: string;
  declare position: number;
  declare substanceId: string;
  declare lotId: string;
  declare unit: LedgerUnit;
  declare targetMicro: number;
  declare lowMicro: number;
  declare highMicro: number;
  declare actualMicro: CreationOptional<number | null>;
  declare explanation: CreationOptional<string | null>;
  declare enteredById: CreationOptional<string | null>;
  declare enteredAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    BatchTakeModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        batchId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        lotId: { type: DataTypes.UUID, allowNull: false },
        unit: { type: DataTypes.STRING, allowNull: false },
        targetMicro: { type: DataTypes.BIGINT, allowNull: false },
        lowMicro: { type: DataTypes.BIGINT, allowNull: false },
        highMicro: { type: DataTypes.BIGINT, allowNull: false },
        actualMicro: { type: DataTypes.BIGINT, defaultValue: null },
        explanation: { type: DataTypes.TEXT, defaultValue: null },
        enteredById: { type: DataTypes.UUID, defaultValue: null },
        enteredAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'BatchTake', tableName: 'batch_takes' },
    );
  }
}
