import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('batches', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    solutionId: { type: DataTypes.UUID, allowNull: false, ...reference('solutions') },
    volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    makeOn: { type: DataTypes.DATEONLY, allowNull: false },
    readyBy: { type: DataTypes.DATE, allowNull: false },
    useBy: { type: DataTypes.DATE },
    sheet: { type: DataTypes.JSON, allowNull: false },
    actual: { type: DataTypes.JSON },
    plannedById: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    makerId: { type: DataTypes.UUID, ...reference('users') },
    checkerId: { type: DataTypes.UUID, ...reference('users') },
    madeAt: { type: DataTypes.DATE },
    heldAt: { type: DataTypes.DATE },
    heldReason: { type: DataTypes.TEXT },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('batch_requests', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    batchId: { type: DataTypes.UUID, allowNull: false, ...reference('batches', 'CASCADE') },
    requestId: { type: DataTypes.UUID, allowNull: false, ...reference('requests') },
    volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('batch_takes', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    batchId: { type: DataTypes.UUID, allowNull: false, ...reference('batches', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    lotId: { type: DataTypes.UUID, allowNull: false, ...reference('lots') },
    unit: { type: DataTypes.STRING, allowNull: false },
    targetMicro: { type: DataTypes.BIGINT, allowNull: false },
    lowMicro: { type: DataTypes.BIGINT, allowNull: false },
    highMicro: { type: DataTypes.BIGINT, allowNull: false },
    actualMicro: { type: DataTypes.BIGINT },
    explanation: { type: DataTypes.TEXT },
    enteredById: { type: DataTypes.UUID, ...reference('users') },
    enteredAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('batch_steps', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    batchId: { type: DataTypes.UUID, allowNull: false, ...reference('batches', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    kind: { type: DataTypes.STRING, allowNull: false },
    text: { type: DataTypes.TEXT, allowNull: false },
    doneAt: { type: DataTypes.DATE },
    doneById: { type: DataTypes.UUID, ...reference('users') },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('bottles', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    batchId: { type: DataTypes.UUID, allowNull: false, ...reference('batches') },
    requestId: { type: DataTypes.UUID, ...reference('requests') },
    volumeMl: { type: DataTypes.DOUBLE, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    placeId: { type: DataTypes.UUID, ...reference('places') },
    publicToken: { type: DataTypes.STRING, allowNull: false, unique: true },
    tokenRevokedAt: { type: DataTypes.DATE },
    labelPrints: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('batches', ['solutionId']);
  await schema.addIndex('batches', ['state']);
  await schema.addIndex('batches', ['makeOn']);
  await schema.addIndex('batches', ['plannedById']);
  await schema.addIndex('batches', ['makerId']);
  await schema.addIndex('batches', ['checkerId']);
  await schema.addIndex('batch_requests', ['batchId']);
  await schema.addIndex('batch_requests', ['requestId']);
  await schema.addIndex('batch_takes', ['batchId']);
  await schema.addIndex('batch_takes', ['substanceId']);
  await schema.addIndex('batch_takes', ['lotId']);
  await schema.addIndex('batch_takes', ['enteredById']);
  await schema.addIndex('batch_steps', ['batchId']);
  await schema.addIndex('batch_steps', ['doneById']);
  await schema.addIndex('bottles', ['batchId']);
  await schema.addIndex('bottles', ['requestId']);
  await schema.addIndex('bottles', ['state']);
  await schema.addIndex('bottles', ['placeId']);
  await schema.addIndex('batch_takes', ['batchId', 'position'], { unique: true });
  await schema.addIndex('batch_steps', ['batchId', 'position'], { unique: true });
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('bottles');
  await schema.dropTable('batch_steps');
  await schema.dropTable('batch_takes');
  await schema.dropTable('batch_requests');
  await schema.dropTable('batches');
}
