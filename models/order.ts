import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { OrderState } from '@/lib/domain/states';

/** An order to one supplier. */
export class OrderModel extends Model<InferAttributes<OrderModel>, InferCreationAttributes<OrderModel>> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare supplierId: string;
  declare budgetId: string;
  declare state: OrderState;
  declare draftedById: string;
  declare approvedById: CreationOptional<string | null>;
  declare note: CreationOptional<string | null>;
  declare currency: string;
  declare goodsMinor: number;
  declare surchargeMinor: number;
  declare totalMinor: number;
  declare supplierReference: CreationOptional<string | null>;
  declare sentAt: CreationOptional<Date | null>;
  declare paidAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    OrderModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        supplierId: { type: DataTypes.UUID, allowNull: false },
        budgetId: { type: DataTypes.UUID, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        draftedById: { type: DataTypes.UUID, allowNull: false },
        approvedById: { type: DataTypes.UUID, defaultValue: null },
        note: { type: DataTypes.TEXT, defaultValue: null },
        currency: { type: DataTypes.STRING, allowNull: false },
        goodsMinor: { type: DataTypes.INTEGER, allowNull: false },
        surchargeMinor: { type: DataTypes.INTEGER, allowNull: false },
        totalMinor: { type: DataTypes.INTEGER, allowNull: false },
        supplierReference: { type: DataTypes.STRING, defaultValue: null },
        sentAt: { type: DataTypes.DATE, defaultValue: null },
        paidAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Order', tableName: 'orders' },
    );
  }
}
