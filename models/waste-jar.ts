import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';

/** A jar whose content is known by composition. */
export class WasteJarModel extends Model<
  InferAttributes<WasteJarModel>,
  InferCreationAttributes<WasteJarModel>
> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare stream: string;
  declare placeId: string;
  declare capacityMl: number;
  declare volumeMl: CreationOptional<number>;
  declare content: JsonObject;
  declare collectionId: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    WasteJarModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        stream: { type: DataTypes.STRING, allowNull: false },
        placeId: { type: DataTypes.UUID, allowNull: false },
        capacityMl: { type: DataTypes.DOUBLE, allowNull: false },
        volumeMl: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
        content: { type: DataTypes.JSON, allowNull: false },
        collectionId: { type: DataTypes.UUID, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'WasteJar', tableName: 'waste_jars' },
    );
  }
}
