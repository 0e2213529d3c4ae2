import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** One solute of a recipe. */
export class SolutionSoluteModel extends Model<
  InferAttributes<SolutionSoluteModel>,
  InferCreationAttributes<SolutionSoluteModel>
> {
  declare id: CreationOptional<string>;
  declare solutionId: string;
  declare position: number;
  declare substanceId: string;
  declare molarity: number;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SolutionSoluteModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        solutionId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        substanceId: { type: DataTypes.STRING(80), allowNull: false },
        molarity: { type: DataTypes.DOUBLE, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'SolutionSolute', tableName: 'solution_solutes' },
    );
  }
}
