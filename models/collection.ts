import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';

/** Waste handed to a carrier with its manifest. */
export class CollectionModel extends Model<
  InferAttributes<CollectionModel>,
  InferCreationAttributes<CollectionModel>
> {
  declare id: CreationOptional<string>;
  declare collectedOn: string;
  declare carrier: string;
  declare manifest: JsonObject;
  declare actorId: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    CollectionModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        collectedOn: { type: DataTypes.DATEONLY, allowNull: false },
        carrier: { type: DataTypes.STRING, allowNull: false },
        manifest: { type: DataTypes.JSON, allowNull: false },
        actorId: { type: DataTypes.UUID, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Collection', tableName: 'collections' },
    );
  }
}
