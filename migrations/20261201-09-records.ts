import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { makeAppendOnly } from '@/models/sqlite';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('record_entries', {
    seq: { type: DataTypes.INTEGER, primaryKey: true, autoIncrement: true, allowNull: false },
    at: { type: DataTypes.STRING, allowNull: false },
    actorId: { type: DataTypes.UUID },
    actorName: { type: DataTypes.STRING, allowNull: false },
    subjectType: { type: DataTypes.STRING, allowNull: false },
    subjectId: { type: DataTypes.STRING, allowNull: false },
    subjectLabel: { type: DataTypes.STRING, allowNull: false },
    action: { type: DataTypes.STRING, allowNull: false },
    fromState: { type: DataTypes.STRING },
    toState: { type: DataTypes.STRING },
    reason: { type: DataTypes.TEXT },
    detail: { type: DataTypes.JSON, allowNull: false },
    previousHash: { type: DataTypes.STRING, allowNull: false },
    hash: { type: DataTypes.STRING, allowNull: false, unique: true },
  });
  await schema.createTable('idempotency_keys', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    key: { type: DataTypes.STRING, allowNull: false },
    userId: { type: DataTypes.UUID, allowNull: false },
    endpoint: { type: DataTypes.STRING, allowNull: false },
    requestHash: { type: DataTypes.STRING, allowNull: false },
    responseStatus: { type: DataTypes.INTEGER, allowNull: false },
    responseBody: { type: DataTypes.JSON, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('outbox_messages', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    channel: { type: DataTypes.STRING, allowNull: false },
    dedupeKey: { type: DataTypes.STRING, allowNull: false, unique: true },
    payload: { type: DataTypes.JSON, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    attempts: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    nextAttemptAt: { type: DataTypes.DATE, allowNull: false },
    lastError: { type: DataTypes.TEXT },
    sentAt: { type: DataTypes.DATE },
    subjectType: { type: DataTypes.STRING },
    subjectId: { type: DataTypes.STRING },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('webhook_events', {
    id: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
    kind: { type: DataTypes.STRING, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('counters', {
    name: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
    value: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
  });
  await schema.createTable('settings', {
    key: { type: DataTypes.STRING(80), primaryKey: true, allowNull: false },
    value: { type: DataTypes.JSON, allowNull: false },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('outbox_messages', ['state']);
  await schema.addIndex('outbox_messages', ['nextAttemptAt']);
  await schema.addIndex('idempotency_keys', ['userId', 'endpoint', 'key'], { unique: true });
  await schema.addIndex('record_entries', ['subjectType', 'subjectId']);
  await schema.addIndex('record_entries', ['at']);
  await schema.addIndex('outbox_messages', ['state', 'nextAttemptAt']);
  for (const table of ['movements', 'record_entries']) await makeAppendOnly(schema.sequelize, table);
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('settings');
  await schema.dropTable('counters');
  await schema.dropTable('webhook_events');
  await schema.dropTable('outbox_messages');
  await schema.dropTable('idempotency_keys');
  await schema.dropTable('record_entries');
}
