import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { PaymentState } from '@/lib/domain/states';

/** Money asked for through the payment service. */
export class PaymentModel extends Model<
  InferAttributes<PaymentModel>,
  InferCreationAttributes<PaymentModel>
> {
  declare id: CreationOptional<string>;
  declare orderId: string;
  declare amountMinor: number;
  declare currency: string;
  declare intentReference: CreationOptional<string | null>;
  declare state: PaymentState;
  declare requestedById: string;
  declare failure: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    PaymentModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        orderId: { type: DataTypes.UUID, allowNull: false },
        amountMinor: { type: DataTypes.INTEGER, allowNull: false },
        currency: { type: DataTypes.STRING, allowNull: false },
        intentReference: { type: DataTypes.STRING, defaultValue: null },
        state: { type: DataTypes.STRING, allowNull: false },
        requestedById: { type: DataTypes.UUID, allowNull: false },
        failure: { type: DataTypes.TEXT, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Payment', tableName: 'payments' },
    );
  }
}
