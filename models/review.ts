import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { ReviewState } from '@/lib/domain/states';

/** A safety officer's judgement of a plan. */
export class ReviewModel extends Model<InferAttributes<ReviewModel>, InferCreationAttributes<ReviewModel>> {
  declare id: CreationOptional<string>;
  declare requestId: string;
  declare planId: string;
  declare planHash: string;
  declare state: ReviewState;
  declare gravity: number;
  declare reviewerId: CreationOptional<string | null>;
  declare decidedAt: CreationOptional<Date | null>;
  declare decisionText: CreationOptional<string | null>;
  declare conditions: string[];
  declare lapsesAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    ReviewModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        requestId: { type: DataTypes.UUID, allowNull: false },
        planId: { type: DataTypes.UUID, allowNull: false },
        planHash: { type: DataTypes.STRING, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        gravity: { type: DataTypes.INTEGER, allowNull: false },
        reviewerId: { type: DataTypes.UUID, defaultValue: null },
        decidedAt: { type: DataTypes.DATE, defaultValue: null },
        decisionText: { type: DataTypes.TEXT, defaultValue: null },
        conditions: { type: DataTypes.JSON, allowNull: false },
        lapsesAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Review', tableName: 'reviews' },
    );
  }
}
