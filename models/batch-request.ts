import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** Which request a batch serves, and with how much. */
export class BatchRequestModel extends Model<
  InferAttributes<BatchRequestModel>,
  InferCreationAttributes<BatchRequestModel>
> {
  declare id: CreationOptional<string>;
  declare batchId: string;
  declare requestId: string;
  declare volumeMl: number;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    BatchRequestModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        batchId: { type: DataTypes.UUID, allowNull: false },
        requestId: { type: DataTypes.UUID, allowNull: false },
        volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'BatchRequest', tableName: 'batch_requests' },
    );
  }
}
