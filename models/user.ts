import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { Role } from '@/lib/domain/roles';

/** A person who signs in. */
export class UserModel extends Model<InferAttributes<UserModel>, InferCreationAttributes<UserModel>> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare name: string;
  declare passwordHash: string;
  declare roles: Role[];
  declare sessionVersion: CreationOptional<number>;
  declare failedSignIns: CreationOptional<number>;
  declare lockedUntil: CreationOptional<Date | null>;
  declare disabledAt: CreationOptional<Date | null>;
  declare approvalLimitMinor: CreationOptional<number>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    UserModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        email: { type: DataTypes.STRING, allowNull: false, unique: true },
        name: { type: DataTypes.STRING, allowNull: false },
        passwordHash: { type: DataTypes.STRING, allowNull: false },
        roles: { type: DataTypes.JSON, allowNull: false },
        sessionVersion: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
        failedSignIns: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        lockedUntil: { type: DataTypes.DATE, defaultValue: null },
        disabledAt: { type: DataTypes.DATE, defaultValue: null },
        approvalLimitMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'User', tableName: 'users' },
    );
  }
}
