import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';

/** A pack on offer. */
export class OfferModel extends Model<InferAttributes<OfferModel>, InferCreationAttributes<OfferModel>> {
  declare id: CreationOptional<string>;
  declare supplierId: string;
  declare substanceId: string;
  declare stockNumber: string;
  declare packMicro: number;
  declare unit: LedgerUnit;
  declare priceMinor: number;
  declare assayPercent: CreationOptional<number | null>;
  declare hazardous: CreationOptional<boolean>;
  declare active: CreationOptional<boolean>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    OfferModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        supplierId: { type: DataTypes.UUID, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        stockNumber: { type: DataTypes.STRING, allowNull: false },
        packMicro: { type: DataTypes.BIGINT, allowNull: false },
        unit: { type: DataTypes.STRING, allowNull: false },
        priceMinor: { type: DataTypes.INTEGER, allowNull: false },
        assayPercent: { type: DataTypes.DOUBLE, defaultValue: null },
        hazardous: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
        active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Offer', tableName: 'offers' },
    );
  }
}
