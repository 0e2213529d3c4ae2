import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('substances', {
    id: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false },
    cas: { type: DataTypes.STRING, allowNull: false },
    formula: { type: DataTypes.STRING, allowNull: false },
    molarMassGPerMol: { type: DataTypes.DOUBLE },
    form: { type: DataTypes.STRING, allowNull: false },
    unit: { type: DataTypes.STRING, allowNull: false },
    storageGroup: { type: DataTypes.STRING, allowNull: false },
    restricted: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
    searchText: { type: DataTypes.TEXT, allowNull: false },
    heldAt: { type: DataTypes.DATE },
    heldReason: { type: DataTypes.TEXT },
    lowStockMicro: { type: DataTypes.BIGINT },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('data_sheets', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    fileName: { type: DataTypes.STRING, allowNull: false },
    storedName: { type: DataTypes.STRING, allowNull: false, unique: true },
    sizeBytes: { type: DataTypes.INTEGER, allowNull: false },
    sha256: { type: DataTypes.STRING, allowNull: false },
    uploadedById: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('solutions', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false },
    ownerId: { type: DataTypes.UUID, ...reference('users') },
    shared: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
    shelfLifeDays: { type: DataTypes.INTEGER, allowNull: false },
    storageNote: { type: DataTypes.TEXT },
    densityGPerMl: { type: DataTypes.DOUBLE },
    toleranceClass: { type: DataTypes.STRING, allowNull: false },
    sameDayOnly: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
    archivedAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('solution_solutes', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    solutionId: { type: DataTypes.UUID, allowNull: false, ...reference('solutions', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    molarity: { type: DataTypes.DOUBLE, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('demonstrations', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false },
    ownerId: { type: DataTypes.UUID, ...reference('users') },
    shared: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
    outcomeWanted: { type: DataTypes.TEXT },
    vesselMl: { type: DataTypes.DOUBLE, allowNull: false },
    archivedAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('demonstration_portions', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    demonstrationId: { type: DataTypes.UUID, allowNull: false, ...reference('demonstrations', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    solutionId: { type: DataTypes.UUID, allowNull: false, ...reference('solutions') },
    volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('substances', ['name']);
  await schema.addIndex('substances', ['cas']);
  await schema.addIndex('data_sheets', ['substanceId']);
  await schema.addIndex('data_sheets', ['uploadedById']);
  await schema.addIndex('solutions', ['name']);
  await schema.addIndex('solutions', ['ownerId']);
  await schema.addIndex('solution_solutes', ['solutionId']);
  await schema.addIndex('solution_solutes', ['substanceId']);
  await schema.addIndex('demonstrations', ['name']);
  await schema.addIndex('demonstrations', ['ownerId']);
  await schema.addIndex('demonstration_portions', ['demonstrationId']);
  await schema.addIndex('demonstration_portions', ['solutionId']);
  await schema.addIndex('solution_solutes', ['solutionId', 'position'], { unique: true });
  await schema.addIndex('demonstration_portions', ['demonstrationId', 'position'], { unique: true });
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('demonstration_portions');
  await schema.dropTable('demonstrations');
  await schema.dropTable('solution_solutes');
  await schema.dropTable('solutions');
  await schema.dropTable('data_sheets');
  await schema.dropTable('substances');
}
