import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** A room with the air it holds. */
export class RoomModel extends Model<InferAttributes<RoomModel>, InferCreationAttributes<RoomModel>> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare volumeM3: number;
  declare airChangesPerHour: number;
  declare fumeCupboards: CreationOptional<number>;
  declare benches: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    RoomModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false, unique: true },
        volumeM3: { type: DataTypes.DOUBLE, allowNull: false },
        airChangesPerHour: { type: DataTypes.DOUBLE, allowNull: false },
        fumeCupboards: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        benches: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Room', tableName: 'rooms' },
    );
  }
}
