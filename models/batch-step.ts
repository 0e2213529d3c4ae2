import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { BatchStepKind } from '@/lib/domain/states';

/** A line of the batch sheet to be ticked. */
export class BatchStepModel extends Model<
  InferAttributes<BatchStepModel>,
  InferCreationAttributes<BatchStepModel>
> {
  declare id: CreationOptional<string>;
  declare batchId: string;
  declare position: number;
  declare kind: BatchStepKind;
  declare text: string;
  declare doneAt: CreationOptional<Date | null>;
  declare doneById: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    BatchStepModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        batchId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        text: { type: DataTypes.TEXT, allowNull: false },
        doneAt: { type: DataTypes.DATE, defaultValue: null },
        doneById: { type: DataTypes.UUID, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'BatchStep', tableName: 'batch_steps' },
    );
  }
}
