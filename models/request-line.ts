import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { RequestLineKind } from '@/lib/domain/states';

/** A solution or a demonstration asked for. */
export class RequestLineModel extends Model<
  InferAttributes<RequestLineModel>,
  InferCreationAttributes<RequestLineModel>
> {
  declare id: CreationOptional<string>;
  declare requestId: string;
  declare position: number;
  declare kind: RequestLineKind;
  declare solutionId: CreationOptional<string | null>;
  declare demonstrationId: CreationOptional<string | null>;
  declare volumePerBenchMl: CreationOptional<number | null>;
  declare spareBenches: CreationOptional<number>;
  declare performances: CreationOptional<number | null>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    RequestLineModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        requestId: { type: DataTypes.UUID, allowNull: false },
        position: { type: DataTypes.INTEGER, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        solutionId: { type: DataTypes.UUID, defaultValue: null },
        demonstrationId: { type: DataTypes.UUID, defaultValue: null },
        volumePerBenchMl: { type: DataTypes.DOUBLE, defaultValue: null },
        spareBenches: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
        performances: { type: DataTypes.INTEGER, defaultValue: null },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'RequestLine', tableName: 'request_lines' },
    );
  }
}
