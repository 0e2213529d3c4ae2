import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** One pour of a demonstration. */
export class DemonstrationPortionModel extends Model<
  InferAttributes<DemonstrationPortionModel>,
  InferCreationAttributes<DemonstrationPortionModel>
> {
  declare id: CreationOptional<string>;
  declare demonstrationId: string;
  declare position: number;
  declare solutionId: string;
  declare volumeMl: number;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    DemonstrationPortionModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        demonstrationId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        solutionId: { type: DataTypes.UUID, allowNull: false },
        volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'DemonstrationPortion', tableName: 'demonstration_portions' },
    );
  }
}
