import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** The last number given out for a series of codes. */
export class CounterModel extends Model<
  InferAttributes<CounterModel>,
  InferCreationAttributes<CounterModel>
> {
  declare name: string;
  declare value: CreationOptional<number>;

  static define(sequelize: Sequelize): void {
    CounterModel.init(
      {
        name: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
        value: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
      },
      { sequelize, modelName: 'Counter', tableName: 'counters', timestamps: false },
    );
  }
}
