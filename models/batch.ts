import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { JsonObject } from '@/lib/domain/json';
import type { BatchState } from '@/lib/domain/states';

/** One solution made once. */
export class BatchModel extends Model<InferAttributes<BatchModel>, InferCreationAttributes<BatchModel>> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare solutionId: string;
  declare volumeMl: number;
  declare state: BatchState;
  declare makeOn: string;
  declare readyBy: Date;
  declare useBy: CreationOptional<Date | null>;
  declare sheet: JsonObject;
  declare actual: CreationOptional<JsonObject | null>;
  declare plannedById: string;
  declare makerId: CreationOptional<string | null>;
  declare checkerId: CreationOptional<string | null>;
  declare madeAt: CreationOptional<Date | null>;
  declare heldAt: CreationOptional<Date | null>;
  declare heldReason: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    BatchModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        solutionId: { type: DataTypes.UUID, allowNull: false },
        volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        makeOn: { type: DataTypes.DATEONLY, allowNull: false },
        readyBy: { type: DataTypes.DATE, allowNull: false },
        useBy: { type: DataTypes.DATE, defaultValue: null },
        sheet: { type: DataTypes.JSON, allowNull: false },
        actual: { type: DataTypes.JSON, defaultValue: null },
        plannedById: { type: DataTypes.UUID, allowNull: false },
        makerId: { type: DataTypes.UUID, defaultValue: null },
        checkerId: { type: DataTypes.UUID, defaultValue: null },
        madeAt: { type: DataTypes.DATE, defaultValue: null },
        heldAt: { type: DataTypes.DATE, defaultValue: null },
        heldReason: { type: DataTypes.TEXT, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Batch', tableName: 'batches' },
    );
  }
}
