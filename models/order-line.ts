import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';

/** Packs of one offer. */
export class OrderLineModel extends Model<
  InferAttributes<OrderLineModel>,
  InferCreationAttributes<OrderLineModel>
> {
  declare id: CreationOptional<string>;
  declare orderId: string;
  declare position: number;
  declare offerId: string;
  declare substanceId: string;
  declare packs: number;
  declare packMicro: number;
  declare unit: LedgerUnit;
  declare priceMinor: number;
  declare lineTotalMinor: number;
  declare receivedPacks: CreationOptional<number>;
  declare supplierStatus: CreationOptional<string | null>;
  declare reason: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    OrderLineModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        orderId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        offerId: { type: DataTypes.UUID, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        packs: { type: DataTypes.INTEGER, allowNull: false },
        packMicro: { type: DataTypes.BIGINT, allowNull: false },
        unit: { type: DataTypes.STRING, allowNull: false },
        priceMinor: { type: DataTypes.INTEGER, allowNull: false },
        lineTotalMinor: { type: DataTypes.INTEGER, allowNull: false },
        receivedPacks: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        supplierStatus: { type: DataTypes.STRING, defaultValue: null },
        reason: { type: DataTypes.TEXT, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'OrderLine', tableName: 'order_lines' },
    );
  }
}
