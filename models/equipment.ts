import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { EquipmentKind } from '@/lib/domain/states';

/** Balances and glassware that a room owns. */
export class EquipmentModel extends Model<
  InferAttributes<EquipmentModel>,
  InferCreationAttributes<EquipmentModel>
> {
  declare id: CreationOptional<string>;
  declare roomId: string;
  declare kind: EquipmentKind;
  declare name: string;
  declare capacityMl: CreationOptional<number | null>;
  declare toleranceMl: CreationOptional<number | null>;
  declare glassClass: CreationOptional<string | null>;
  declare capacityG: CreationOptional<number | null>;
  declare readabilityG: CreationOptional<number | null>;
  declare repeatabilityG: CreationOptional<number | null>;
  declare count: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    EquipmentModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        roomId: { type: DataTypes.UUID, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        name: { type: DataTypes.STRING, allowNull: false },
        capacityMl: { type: DataTypes.DOUBLE, defaultValue: null },
        toleranceMl: { type: DataTypes.DOUBLE, defaultValue: null },
        glassClass: { type: DataTypes.STRING, defaultValue: null },
        capacityG: { type: DataTypes.DOUBLE, defaultValue: null },
        readabilityG: { type: DataTypes.DOUBLE, defaultValue: null },
        repeatabilityG: { type: DataTypes.DOUBLE, defaultValue: null },
        count: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Equipment', tableName: 'equipment' },
    );
  }
}
