import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';

/** A received pack or bottle; its balance is the sum of its movements. */
export class LotModel extends Model<InferAttributes<LotModel>, InferCreationAttributes<LotModel>> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare substanceId: string;
  declare supplierId: CreationOptional<string | null>;
  declare lotNumber: string;
  declare assayPercent: CreationOptional<number | null>;
  declare unit: LedgerUnit;
  declare receivedOn: string;
  declare openedOn: CreationOptional<string | null>;
  declare expiresOn: CreationOptional<string | null>;
  declare placeId: string;
  declare balanceMicro: CreationOptional<number>;
  declare heldAt: CreationOptional<Date | null>;
  declare heldReason: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    LotModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        supplierId: { type: DataTypes.UUID, defaultValue: null },
        lotNumber: { type: DataTypes.STRING, allowNull: false },
        assayPercent: { type: DataTypes.DOUBLE, defaultValue: null },
        unit: { type: DataTypes.STRING, allowNull: false },
        receivedOn: { type: DataTypes.DATEONLY, allowNull: false },
        openedOn: { type: DataTypes.DATEONLY, defaultValue: null },
        expiresOn: { type: DataTypes.DATEONLY, defaultValue: null },
        placeId: { type: DataTypes.UUID, allowNull: false },
        balanceMicro: { type: DataTypes.BIGINT, allowNull: false, defaultValue: 0 },
        heldAt: { type: DataTypes.DATE, defaultValue: null },
        heldReason: { type: DataTypes.TEXT, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Lot', tableName: 'lots' },
    );
  }
}
