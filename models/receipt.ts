import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** Packs that arrived and the lot they became. */
export class ReceiptModel extends Model<
  InferAttributes<ReceiptModel>,
  InferCreationAttributes<ReceiptModel>
> {
  declare id: CreationOptional<string>;
  declare orderLineId: string;
  declare lotId: string;
  declare packs: number;
  declare receivedById: string;
  declare note: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    ReceiptModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        orderLineId: { type: DataTypes.UUID, allowNull: false },
        lotId: { type: DataTypes.UUID, allowNull: false },
        packs: { type: DataTypes.INTEGER, allowNull: false },
        receivedById: { type: DataTypes.UUID, allowNull: false },
        note: { type: DataTypes.TEXT, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Receipt', tableName: 'receipts' },
    );
  }
}
