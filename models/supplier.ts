import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** A supplier with its terms. */
export class SupplierModel extends Model<
  InferAttributes<SupplierModel>,
  InferCreationAttributes<SupplierModel>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare email: string;
  declare accountCode: string;
  declare leadDays: number;
  declare minimumOrderMinor: CreationOptional<number>;
  declare carriageMinor: CreationOptional<number>;
  declare hazardSurchargeMinor: CreationOptional<number>;
  declare active: CreationOptional<boolean>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SupplierModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false, unique: true },
        email: { type: DataTypes.STRING, allowNull: false },
        accountCode: { type: DataTypes.STRING, allowNull: false },
        leadDays: { type: DataTypes.INTEGER, allowNull: false },
        minimumOrderMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        carriageMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        hazardSurchargeMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Supplier', tableName: 'suppliers' },
    );
  }
}
