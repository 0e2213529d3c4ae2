import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';

/** A bench session of a course. */
export class SessionModel extends Model<
  InferAttributes<SessionModel>,
  InferCreationAttributes<SessionModel>
> {
  declare id: CreationOptional<string>;
  declare course: string;
  declare title: string;
  declare startsAt: Date;
  declare endsAt: Date;
  declare roomId: string;
  declare benches: number;
  declare instructorId: string;
  declare cancelledAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SessionModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        course: { type: DataTypes.STRING, allowNull: false },
        title: { type: DataTypes.STRING, allowNull: false },
        startsAt: { type: DataTypes.DATE, allowNull: false },
        endsAt: { type: DataTypes.DATE, allowNull: false },
        roomId: { type: DataTypes.UUID, allowNull: false },
        benches: { type: DataTypes.INTEGER, allowNull: false },
        instructorId: { type: DataTypes.UUID, allowNull: false },
        cancelledAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Session', tableName: 'sessions' },
    );
  }
}
