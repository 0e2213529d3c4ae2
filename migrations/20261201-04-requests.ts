import type { QueryInterface } from 'sequelize';
import { DataTypes } from 'sequelize';
import { reference } from './columns';

export async function up(schema: QueryInterface): Promise<void> {
  await schema.createTable('sessions', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    course: { type: DataTypes.STRING, allowNull: false },
    title: { type: DataTypes.STRING, allowNull: false },
    startsAt: { type: DataTypes.DATE, allowNull: false },
    endsAt: { type: DataTypes.DATE, allowNull: false },
    roomId: { type: DataTypes.UUID, allowNull: false, ...reference('rooms') },
    benches: { type: DataTypes.INTEGER, allowNull: false },
    instructorId: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    cancelledAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('requests', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    code: { type: DataTypes.STRING, allowNull: false, unique: true },
    sessionId: { type: DataTypes.UUID, allowNull: false, ...reference('sessions') },
    requesterId: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    state: { type: DataTypes.STRING, allowNull: false },
    note: { type: DataTypes.TEXT },
    planHash: { type: DataTypes.STRING },
    submittedAt: { type: DataTypes.DATE },
    closedAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('request_lines', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    requestId: { type: DataTypes.UUID, allowNull: false, ...reference('requests', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    kind: { type: DataTypes.STRING, allowNull: false },
    solutionId: { type: DataTypes.UUID, ...reference('solutions') },
    demonstrationId: { type: DataTypes.UUID, ...reference('demonstrations') },
    volumePerBenchMl: { type: DataTypes.DOUBLE },
    spareBenches: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    performances: { type: DataTypes.INTEGER },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('plans', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    requestId: { type: DataTypes.UUID, allowNull: false, ...reference('requests', 'CASCADE') },
    hash: { type: DataTypes.STRING, allowNull: false },
    decision: { type: DataTypes.STRING, allowNull: false },
    content: { type: DataTypes.JSON, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('findings', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    planId: { type: DataTypes.UUID, allowNull: false, ...reference('plans', 'CASCADE') },
    position: { type: DataTypes.INTEGER, allowNull: false },
    rule: { type: DataTypes.STRING, allowNull: false },
    severity: { type: DataTypes.STRING, allowNull: false },
    scope: { type: DataTypes.STRING, allowNull: false },
    title: { type: DataTypes.TEXT, allowNull: false },
    reason: { type: DataTypes.TEXT, allowNull: false },
    detail: { type: DataTypes.JSON, allowNull: false },
    source: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('reviews', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    requestId: { type: DataTypes.UUID, allowNull: false, ...reference('requests', 'CASCADE') },
    planId: { type: DataTypes.UUID, allowNull: false, ...reference('plans') },
    planHash: { type: DataTypes.STRING, allowNull: false },
    state: { type: DataTypes.STRING, allowNull: false },
    gravity: { type: DataTypes.INTEGER, allowNull: false },
    reviewerId: { type: DataTypes.UUID, ...reference('users') },
    decidedAt: { type: DataTypes.DATE },
    decisionText: { type: DataTypes.TEXT },
    conditions: { type: DataTypes.JSON, allowNull: false },
    lapsesAt: { type: DataTypes.DATE },
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 0 },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.createTable('review_messages', {
    id: { type: DataTypes.UUID, primaryKey: true, allowNull: false },
    reviewId: { type: DataTypes.UUID, allowNull: false, ...reference('reviews', 'CASCADE') },
    authorId: { type: DataTypes.UUID, allowNull: false, ...reference('users') },
    body: { type: DataTypes.TEXT, allowNull: false },
    createdAt: { type: DataTypes.DATE, allowNull: false },
    updatedAt: { type: DataTypes.DATE, allowNull: false },
  });
  await schema.addIndex('sessions', ['startsAt']);
  await schema.addIndex('sessions', ['roomId']);
  await schema.addIndex('sessions', ['instructorId']);
  await schema.addIndex('requests', ['sessionId']);
  await schema.addIndex('requests', ['requesterId']);
  await schema.addIndex('requests', ['state']);
  await schema.addIndex('request_lines', ['requestId']);
  await schema.addIndex('request_lines', ['solutionId']);
  await schema.addIndex('request_lines', ['demonstrationId']);
  await schema.addIndex('plans', ['requestId']);
  await schema.addIndex('plans', ['hash']);
  await schema.addIndex('findings', ['planId']);
  await schema.addIndex('reviews', ['requestId']);
  await schema.addIndex('reviews', ['planId']);
  await schema.addIndex('reviews', ['state']);
  await schema.addIndex('reviews', ['reviewerId']);
  await schema.addIndex('review_messages', ['reviewId']);
  await schema.addIndex('review_messages', ['authorId']);
  await schema.addIndex('request_lines', ['requestId', 'position'], { unique: true });
}

export async function down(schema: QueryInterface): Promise<void> {
  await schema.dropTable('review_messages');
  await schema.dropTable('reviews');
  await schema.dropTable('findings');
  await schema.dropTable('plans');
  await schema.dropTable('request_lines');
  await schema.dropTable('requests');
  await schema.dropTable('sessions');
}
