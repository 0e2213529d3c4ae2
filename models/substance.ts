import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';

/** A catalogue entry; identity comes from the data files, holds and low-stock points are local. */
export class SubstanceModel extends Model<
  InferAttributes<SubstanceModel>,
  InferCreationAttributes<SubstanceModel>
> {
  declare id: string;
  declare name: string;
  declare cas: string;
  declare formula: string;
  declare molarMassGPerMol: CreationOptional<number | null>;
  declare form: string;
  declare unit: LedgerUnit;
  declare storageGroup: string;
  declare restricted: CreationOptional<boolean>;
  declare searchText: string;
  declare heldAt: CreationOptional<Date | null>;
  declare heldReason: CreationOptional<string | null>;
  declare lowStockMicro: CreationOptional<number | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SubstanceModel.init(
      {
        id: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false },
        cas: { type: DataTypes.STRING, allowNull: false },
        formula: { type: DataTypes.STRING, allowNull: false },
        molarMassGPerMol: { type: DataTypes.DOUBLE, defaultValue: null },
        form: { type: DataTypes.STRING, allowNull: false },
        unit: { type: DataTypes.STRING, allowNull: false },
        storageGroup: { type: DataTypes.STRING, allowNull: false },
        restricted: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
        searchText: { type: DataTypes.TEXT, allowNull: false },
        heldAt: { type: DataTypes.DATE, defaultValue: null },
        heldReason: { type: DataTypes.TEXT, defaultValue: null },
        lowStockMicro: { type: DataTypes.BIGINT, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Substance', tableName: 'substances' },
    );
  }
}
