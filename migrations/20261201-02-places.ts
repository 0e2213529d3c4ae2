import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('rooms', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false, unique: true },
    volumeM3: { type: DataTypes.DOUBLE, allowNull: false },
    airChangesPerHour: { type: DataTypes.DOUBLE, allowNull: false },
    fumeCupboards: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    benches: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('places', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    roomId: { type: DataTypes.UUID, allowNull: false, ...reference('rooms') },
    name: { type: DataTypes.STRING, allowNull: false },
    kind: { type: DataTypes.STRING, allowNull: false },
    storageGroup: { type: DataTypes.STRING, allowNull: false },
    position: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('equipment', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    roomId: { type: DataTypes.UUID, allowNull: false, ...reference('rooms') },
    kind: { type: DataTypes.STRING, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false },
    capacityMl: { type: DataTypes.DOUBLE },
    toleranceMl: { type: DataTypes.DOUBLE },
    glassClass: { type: DataTypes.STRING },
    capacityG: { type: DataTypes.DOUBLE },
    readabilityG: { type: DataTypes.DOUBLE },
    repeatabilityG: { type: DataTypes.DOUBLE },
    count: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('places', ['roomId']);
  await schema.addIndex('equipment', ['roomId']);
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('equipment');
  await schema.dropTable('places');
  await schema.dropTable('rooms');
}
