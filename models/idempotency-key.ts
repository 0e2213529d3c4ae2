import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';

/** The answer given to a call that may be sent twice. */
export class IdempotencyKeyModel extends Model<
  InferAttributes<IdempotencyKeyModel>,
  InferCreationAttributes<IdempotencyKeyModel>
> {
  declare id: CreationOptional<string>;
  declare key: string;
  declare userId: string;
  declare endpoint: string;
  declare requestHash: string;
  declare responseStatus: number;
  declare responseBody: JsonObject;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    IdempotencyKeyModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        key: { type: DataTypes.STRING, allowNull: false },
        userId: { type: DataTypes.UUID, allowNull: false },
        endpoint: { type: DataTypes.STRING, allowNull: false },
        requestHash: { type: DataTypes.STRING, allowNull: false },
        responseStatus: { type: DataTypes.INTEGER, allowNull: false },
        responseBody: { type: DataTypes.JSON, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'IdempotencyKey', tableName: 'idempotency_keys' },
    );
  }
}
