import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { MovementKind } from '@/lib/domain/states';

/** One line of the stock ledger; never edited. Amounts are millionths of the unit. */
export class MovementModel extends Model<
  InferAttributes<MovementModel>,
  InferCreationAttributes<MovementModel>
> {
  declare id: CreationOptional<string>;
  declare lotId: string;
  declare kind: MovementKind;
  declare amountMicro: number;
  declare balanceAfterMicro: number;
  declare actorId: string;
  declare reason: CreationOptional<string | null>;
  declare batchId: CreationOptional<string | null>;
  declare receiptId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    MovementModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        lotId: { type: DataTypes.UUID, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        amountMicro: { type: DataTypes.BIGINT, allowNull: false },
        balanceAfterMicro: { type: DataTypes.BIGINT, allowNull: false },
        actorId: { type: DataTypes.UUID, allowNull: false },
        reason: { type: DataTypes.TEXT, defaultValue: null },
        batchId: { type: DataTypes.UUID, defaultValue: null },
        receiptId: { type: DataTypes.UUID, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Movement', tableName: 'movements', updatedAt: false },
    );
  }
}
