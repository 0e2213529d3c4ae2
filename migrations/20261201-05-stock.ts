import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('suppliers', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false, unique: true },
    email: { type: DataTypes.STRING, allowNull: false },
    accountCode: { type: DataTypes.STRING, allowNull: false },
    leadDays: { type: DataTypes.INTEGER, allowNull: false },
    minimumOrderMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    carriageMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    hazardSurchargeMinor: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('offers', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    supplierId: { type: DataTypes.UUID, allowNull: false, ...reference('suppliers') },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    stockNumber: { type: DataTypes.STRING, allowNull: false },
    packMicro: { type: DataTypes.BIGINT, allowNull: false },
    unit: { type: DataTypes.STRING, allowNull: false },
    priceMinor: { type: DataTypes.INTEGER, allowNull: false },
    assayPercent: { type: DataTypes.DOUBLE },
    hazardous: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
    active: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: true },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('lots', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    supplierId: { type: DataTypes.UUID, ...reference('suppliers') },
    lotNumber: { type: DataTypes.STRING, allowNull: false },
    assayPercent: { type: DataTypes.DOUBLE },
    unit: { type: DataTypes.STRING, allowNull: false },
    receivedOn: { type: DataTypes.DATEONLY, allowNull: false },
    openedOn: { type: DataTypes.DATEONLY },
    expiresOn: { type: DataTypes.DATEONLY },
    placeId: { type: DataTypes.UUID, allowNull: false, ...reference('places') },
    balanceMicro: { type: DataTypes.BIGINT, allowNull: false, defaultValue: 0 },
    heldAt: { type: DataTypes.DATE },
    heldReason: { type: DataTypes.TEXT },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('movements', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    lotId: { type: DataTypes.UUID, allowNull: false, ...reference('lots') },
    kind: { type: DataTypes.STRING, allowNull: false },
    amountMicro: { type: DataTypes.BIGINT, allowNull: false },
    balanceAfterMicro: { type: DataTypes.BIGINT, allowNull: false },
    actorId: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    reason: { type: DataTypes.TEXT },
    batchId: { type: DataTypes.UUID },
    receiptId: { type: DataTypes.UUID },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('offers', ['supplierId']);
  await schema.addIndex('offers', ['substanceId']);
  await schema.addIndex('lots', ['substanceId']);
  await schema.addIndex('lots', ['supplierId']);
  await schema.addIndex('lots', ['expiresOn']);
  await schema.addIndex('lots', ['placeId']);
  await schema.addIndex('movements', ['lotId']);
  await schema.addIndex('movements', ['actorId']);
  await schema.addIndex('movements', ['batchId']);
  await schema.addIndex('movements', ['createdAt']);
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('movements');
  await schema.dropTable('lots');
  await schema.dropTable('offers');
  await schema.dropTable('suppliers');
}
