import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** Solutions poured in a stated order. */
export class DemonstrationModel extends Model<
  InferAttributes<DemonstrationModel>,
  InferCreationAttributes<DemonstrationModel>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare ownerId: CreationOptional<string | null>;
  declare shared: CreationOptional<boolean>;
  declare outcomeWanted: CreationOptional<string | null>;
  declare vesselMl: number;
  declare archivedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    DemonstrationModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false },
        ownerId: { type: DataTypes.UUID, defaultValue: null },
        shared: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
        outcomeWanted: { type: DataTypes.TEXT, defaultValue: null },
        vesselMl: { type: DataTypes.DOUBLE, allowNull: false },
        archivedAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Demonstration', tableName: 'demonstrations' },
    );
  }
}
