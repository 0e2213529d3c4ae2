import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { BottleState } from '@/lib/domain/states';

/** A labelled bottle of a batch. */
export class BottleModel extends Model<InferAttributes<BottleModel>, InferCreationAttributes<BottleModel>> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare batchId: string;
  declare requestId: CreationOptional<string | null>;
  declare volumeMl: number;
  declare state: BottleState;
  declare placeId: CreationOptional<string | null>;
  declare publicToken: string;
  declare tokenRevokedAt: CreationOptional<Date | null>;
  declare labelPrints: CreationOptional<number>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    BottleModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        batchId: { type: DataTypes.UUID, allowNull: false },
        requestId: { type: DataTypes.UUID, defaultValue: null },
        volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        placeId: { type: DataTypes.UUID, defaultValue: null },
        publicToken: { type: DataTypes.STRING, allowNull: false, unique: true },
        tokenRevokedAt: { type: DataTypes.DATE, defaultValue: null },
        labelPrints: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Bottle', tableName: 'bottles' },
    );
  }
}
