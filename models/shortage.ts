import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { LedgerUnit } from '@/lib/domain/quantities';
import type { ShortageState } from '@/lib/domain/states';

/** What planned use lacks, and by when it must be ordered. */
export class ShortageModel extends Model<
  InferAttributes<ShortageModel>,
  InferCreationAttributes<ShortageModel>
> {
  declare id: CreationOptional<string>;
  declare substanceId: string;
  declare unit: LedgerUnit;
  declare neededMicro: number;
  declare neededOn: string;
  declare orderBy: string;
  declare state: ShortageState;
  declare requestId: CreationOptional<string | null>;
  declare batchId: CreationOptional<string | null>;
  declare orderLineId: CreationOptional<string | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    ShortageModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        unit: { type: DataTypes.STRING, allowNull: false },
        neededMicro: { type: DataTypes.BIGINT, allowNull: false },
        neededOn: { type: DataTypes.DATEONLY, allowNull: false },
        orderBy: { type: DataTypes.DATEONLY, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        requestId: { type: DataTypes.UUID, defaultValue: null },
        batchId: { type: DataTypes.UUID, defaultValue: null },
        orderLineId: { type: DataTypes.UUID, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Shortage', tableName: 'shortages' },
    );
  }
}
