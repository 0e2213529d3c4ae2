import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { Severity } from '@/lib/domain/gravity';
import type { JsonObject } from '@/lib/domain/json';

/** One remark of a plan with its rule, evidence and source. */
export class FindingModel extends Model<
  InferAttributes<FindingModel>,
  InferCreationAttributes<FindingModel>
> {
  declare id: CreationOptional<string>;
  declare planId: string;
  declare position: number;
  declare rule: string;
  declare severity: Severity;
  declare scope: string;
  declare title: string;
  declare reason: string;
  declare detail: JsonObject;
  declare source: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    FindingModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        planId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        rule: { type: DataTypes.STRING, allowNull: false },
        severity: { type: DataTypes.STRING, allowNull: false },
        scope: { type: DataTypes.STRING, allowNull: false },
        title: { type: DataTypes.TEXT, allowNull: false },
        reason: { type: DataTypes.TEXT, allowNull: false },
        detail: { type: DataTypes.JSON, allowNull: false },
        source: { type: DataTypes.TEXT, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Finding', tableName: 'findings' },
    );
  }
}
