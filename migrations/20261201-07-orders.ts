import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('budgets', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    name: { type: DataTypes.STRING, allowNull: false },
    year: { type: DataTypes.INTEGER, allowNull: false },
    amountMinor: { type: DataTypes.INTEGER, allowNull: false },
    currency: { type: DataTypes.STRING, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('orders', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    supplierId: { type: DataTypes.UUID, allowNull: false, ...reference('suppliers') },
    budgetId: { type: DataTypes.UUID, allowNull: false, ...reference('budgets') },
    state: { type: DataTypes.STRING, allowNull: false },
    draftedById: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    approvedById: { type: DataTypes.UUID, ...reference('users') },
    note: { type: DataTypes.TEXT },
    currency: { type: DataTypes.STRING, allowNull: false },
    goodsMinor: { type: DataTypes.INTEGER, allowNull: false },
    surchargeMinor: { type: DataTypes.INTEGER, allowNull: false },
    totalMinor: { type: DataTypes.INTEGER, allowNull: false },
    supplierReference: { type: DataTypes.STRING },
    sentAt: { type: DataTypes.DATE },
    paidAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('order_lines', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    orderId: { type: DataTypes.UUID, allowNull: false, ...reference('orders', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    offerId: { type: DataTypes.UUID, allowNull: false, ...reference('offers') },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    packs: { type: DataTypes.INTEGER, allowNull: false },
    packMicro: { type: DataTypes.BIGINT, allowNull: false },
    unit: { type: DataTypes.STRING, allowNull: false },
    priceMinor: { type: DataTypes.INTEGER, allowNull: false },
    lineTotalMinor: { type: DataTypes.INTEGER, allowNull: false },
    receivedPacks: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    supplierStatus: { type: DataTypes.STRING },
    reason: { type: DataTypes.TEXT },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('shortages', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    substanceId: { type: DataTypes.STRING(80), allowNull: false, ...reference('substances') },
    unit: { type: DataTypes.STRING, allowNull: false },
    neededMicro: { type: DataTypes.BIGINT, allowNull: false },
    neededOn: { type: DataTypes.DATEONLY, allowNull: false },
    orderBy: { type: DataTypes.DATEONLY, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    requestId: { type: DataTypes.UUID, ...reference('requests') },
    batchId: { type: DataTypes.UUID, ...reference('batches') },
    orderLineId: { type: DataTypes.UUID, ...reference('order_lines') },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('receipts', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    orderLineId: { type: DataTypes.UUID, allowNull: false, ...reference('order_lines') },
    lotId: { type: DataTypes.UUID, allowNull: false, ...reference('lots') },
    packs: { type: DataTypes.INTEGER, allowNull: false },
    receivedById: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    note: { type: DataTypes.TEXT },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('invoices', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    orderId: { type: DataTypes.UUID, allowNull: false, ...reference('orders') },
    number: { type: DataTypes.STRING, allowNull: false },
    amountMinor: { type: DataTypes.INTEGER, allowNull: false },
    currency: { type: DataTypes.STRING, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    dueOn: { type: DataTypes.DATEONLY },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('payments', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    orderId: { type: DataTypes.UUID, allowNull: false, ...reference('orders') },
    amountMinor: { type: DataTypes.INTEGER, allowNull: false },
    currency: { type: DataTypes.STRING, allowNull: false },
    intentReference: { type: DataTypes.STRING },
    state: { type: DataTypes.STRING, allowNull: false },
    requestedById: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    failure: { type: DataTypes.TEXT },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('orders', ['supplierId']);
  await schema.addIndex('orders', ['budgetId']);
  await schema.addIndex('orders', ['state']);
  await schema.addIndex('orders', ['draftedById']);
  await schema.addIndex('orders', ['approvedById']);
  await schema.addIndex('order_lines', ['orderId']);
  await schema.addIndex('order_lines', ['offerId']);
  await schema.addIndex('order_lines', ['substanceId']);
  await schema.addIndex('shortages', ['substanceId']);
  await schema.addIndex('shortages', ['state']);
  await schema.addIndex('shortages', ['requestId']);
  await schema.addIndex('shortages', ['batchId']);
  await schema.addIndex('shortages', ['orderLineId']);
  await schema.addIndex('receipts', ['orderLineId']);
  await schema.addIndex('receipts', ['lotId']);
  await schema.addIndex('receipts', ['receivedById']);
  await schema.addIndex('invoices', ['orderId']);
  await schema.addIndex('payments', ['orderId']);
  await schema.addIndex('payments', ['intentReference']);
  await schema.addIndex('payments', ['requestedById']);
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('payments');
  await schema.dropTable('invoices');
  await schema.dropTable('receipts');
  await schema.dropTable('shortages');
  await schema.dropTable('order_lines');
  await schema.dropTable('orders');
  await schema.dropTable('budgets');
}
