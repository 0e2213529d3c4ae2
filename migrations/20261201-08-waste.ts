import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('collections', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    collectedOn: { type: DataTypes.DATEONLY, allowNull: false },
    carrier: { type: DataTypes.STRING, allowNull: false },
    manifest: { type: DataTypes.JSON, allowNull: false },
    actorId: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('waste_jars', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    stream: { type: DataTypes.STRING, allowNull: false },
    placeId: { type: DataTypes.UUID, allowNull: false, ...reference('places') },
    capacityMl: { type: DataTypes.DOUBLE, allowNull: false },
    volumeMl: { type: DataTypes.DOUBLE, allowNull: false, defaultValue: 0 },
    content: { type: DataTypes.JSON, allowNull: false },
    collectionId: { type: DataTypes.UUID, ...reference('collections') },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('tasks', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    kind: { type: DataTypes.STRING, allowNull: false },
    role: { type: DataTypes.STRING, allowNull: false },
    text: { type: DataTypes.TEXT, allowNull: false },
    dueAt: { type: DataTypes.DATE, allowNull: false },
    doneAt: { type: DataTypes.DATE },
    doneById: { type: DataTypes.UUID, ...reference('users') },
    subjectType: { type: DataTypes.STRING, allowNull: false },
    subjectId: { type: DataTypes.STRING, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('collections', ['actorId']);
  await schema.addIndex('waste_jars', ['placeId']);
  await schema.addIndex('waste_jars', ['collectionId']);
  await schema.addIndex('tasks', ['dueAt']);
  await schema.addIndex('tasks', ['doneById']);
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('tasks');
  await schema.dropTable('waste_jars');
  await schema.dropTable('collections');
}
