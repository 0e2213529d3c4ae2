import { DataTypes, Model } from 'sequelize';
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize';
import type { Role } from '@/lib/domain/roles';

/** Something due by a time. */
export class TaskModel extends Model<InferAttributes<TaskModel>, InferCreationAttributes<TaskModel>> {
  declare id: CreationOptional<string>;
  declare kind: string;
  declare role: Role;
  declare text: string;
  declare dueAt: Date;
  declare doneAt: CreationOptional<Date | null>;
  declare doneById: CreationOptional<string | null>;
  declare subjectType: string;
  declare subjectId: string;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    TaskModel.init(
      {
        id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4, allowNull: false },
        kind: { type: DataTypes.STRING, allowNull: false },
        role: { type: DataTypes.STRING, allowNull: false },
        text: { type: DataTypes.TEXT, allowNull: false },
        dueAt: { type: DataTypes.DATE, allowNull: false },
        doneAt: { type: DataTypes.DATE, defaultValue: null },
        doneById: { type: DataTypes.UUID, defaultValue: null },
        subjectType: { type: DataTypes.STRING, allowNull: false },
        subjectId: { type: DataTypes.STRING, allowNull: false },
        createdAt: { type: DataTypes.DATE, allowNull: false },
        updatedAt: { type: DataTypes.DATE, allowNull: false },
      },
      { sequelize, modelName: 'Task', tableName: 'tasks' },
    );
  }
}
