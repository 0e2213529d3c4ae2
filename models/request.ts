import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { RequestState } from '@/lib/domain/states';

/** What one session needs. */
export class RequestModel extends Model<
  InferAttributes<RequestModel>,
  InferCreationAttributes<RequestModel>
> {
  declare id: CreationOptional<string>;
  declare code: string;
  declare sessionId: string;
  declare requesterId: string;
  declare state: RequestState;
  declare note: CreationOptional<string | null>;
  declare planHash: CreationOptional<string | null>;
  declare submittedAt: CreationOptional<Date | null>;
  declare closedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    RequestModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        code: { type: DataTypes.STRING, allowNull: false, unique: true },
        sessionId: { type: DataTypes.UUID, allowNull: false },
        requesterId: { type: DataTypes.UUID, allowNull: false },
        state: { type: DataTypes.STRING, allowNull: false },
        note: { type: DataTypes.TEXT, defaultValue: null },
        planHash: { type: DataTypes.STRING, defaultValue: null },
        submittedAt: { type: DataTypes.DATE, defaultValue: null },
        closedAt: { type: DataTypes.DATE, defaultValue: null },
        version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Request', tableName: 'requests' },
    );
  }
}
