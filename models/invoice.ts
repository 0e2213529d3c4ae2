import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { InvoiceState } from '@/lib/domain/states';

/** A supplier's bill. */
export class InvoiceModel extends Model<
  InferAttributes<InvoiceModel>,
  InferCreationAttributes<InvoiceModel>
> {
  declare id: CreationOptional<string>;
  declare orderId: string;
  declare number: string;
  declare amountMinor: number;
  declare currency: string;
  declare state: InvoiceState;
  declare dueOn: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    InvoiceModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        orderId: { type: DataTypes.UUID, allowNull: false },
        number: { type: DataTypes.STRING, allowNull: false },
        amountMinor: { type: DataTypes.INTEGER, allowNull: false },
        currency: { type: DataTypes.STRING, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        dueOn: { type: DataTypes.DATEONLY, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Invoice', tableName: 'invoices' },
    );
  }
}
