import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { Decision } from '@/lib/domain/gravity';
import type { JsonObject } from '@/lib/domain/json';

/** The computed answer to a request, frozen under its content hash. */
export class PlanModel extends Model<InferAttributes<PlanModel>, InferCreationAttributes<PlanModel>> {
  declare id: CreationOptional<string>;
  declare requestId: string;
  declare hash: string;
  declare decision: Decision;
  declare content: JsonObject;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    PlanModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        requestId: { type: DataTypes.UUID, allowNull: false },
        hash: { type: DataTypes.STRING, allowNull: false },
        decision: { type: DataTypes.STRING, allowNull: false },
        content: { type: DataTypes.JSON, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Plan', tableName: 'plans' },
    );
  }
}
