import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** A supplier's safety data sheet kept outside the public folder. */
export class DataSheetModel extends Model<
  InferAttributes<DataSheetModel>,
  InferCreationAttributes<DataSheetModel>
> {
  declare id: CreationOptional<string>;
  declare substanceId: string;
  declare fileName: string;
  declare storedName: string;
  declare sizeBytes: number;
  declare sha256: string;
  declare uploadedById: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    DataSheetModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        fileName: { type: DataTypes.STRING, allowNull: false },
        storedName: { type: DataTypes.STRING, allowNull: false, unique: true },
        sizeBytes: { type: DataTypes.INTEGER, allowNull: false },
        sha256: { type: DataTypes.STRING, allowNull: false },
        uploadedById: { type: DataTypes.UUID, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'DataSheet', tableName: 'data_sheets' },
    );
  }
}
