import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { ToleranceClass } from '@/lib/domain/quantities';

/** A recipe: solutes at strengths in water. */
export class SolutionModel extends Model<
  InferAttributes<SolutionModel>,
  InferCreationAttributes<SolutionModel>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare ownerId: CreationOptional<string | null>;
  declare shared: CreationOptional<boolean>;
  declare shelfLifeDays: number;
  declare storageNote: CreationOptional<string | null>;
  declare densityGPerMl: CreationOptional<number | null>;
  declare toleranceClass: ToleranceClass;
  declare sameDayOnly: CreationOptional<boolean>;
  declare archivedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SolutionModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false },
        ownerId: { type: DataTypes.UUID, defaultValue: null },
        shared: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
        shelfLifeDays: { type: DataTypes.INTEGER, allowNull: false },
        storageNote: { type: DataTypes.TEXT, defaultValue: null },
        densityGPerMl: { type: DataTypes.DOUBLE, defaultValue: null },
        toleranceClass: { type: DataTypes.STRING, allowNull: false },
        sameDayOnly: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
        archivedAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Solution', tableName: 'solutions' },
    );
  }
}
