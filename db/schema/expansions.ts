import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { groups, users } from './accounts.ts';
import { models } from './models.ts';

/**
 * What was computed, free of names: one body serves every expansion that is equal up to renaming and reordering.
 * A body is usable in state complete only; the engine's version is part of its identity, so results never change.
 */
export const bodies = sqliteTable(
  'bodies',
  {
    id: integer('id').primaryKey({ autoIncrement: true }),
    contentHash: text('content_hash').notNull(),
    engineVersion: text('engine_version').notNull(),
    state: text('state', { enum: ['building', 'complete', 'unbalanced', 'abandoned'] }).notNull(),
    classes: integer('classes').notNull().default(0),
    /** Name-free summary and ledger as JSON; null while building. */
    summary: text('summary'),
    ledger: text('ledger'),
    milliseconds: integer('milliseconds'),
    createdAt: text('created_at').notNull(),
    finishedAt: text('finished_at'),
  },
  (table) => [uniqueIndex('bodies_content').on(table.contentHash, table.engineVersion)],
);

/** One diagram of a body, at its place in the canonical order. Numbers of any size are text. */
export const diagrams = sqliteTable(
  'diagrams',
  {
    bodyId: integer('body_id')
      .notNull()
      .references(() => bodies.id, { onDelete: 'cascade' }),
    position: integer('position').notNull(),
    /** Bare canonical label. */
    label: text('label').notNull(),
    body: text('body').notNull(),
    loops: integer('loops').notNull(),
    symmetryFactor: text('symmetry_factor').notNull(),
    weight: text('weight').notNull(),
    pairings: text('pairings').notNull(),
    /** Name-free key of the vertex content. */
    order: text('order_key').notNull(),
    shape: text('shape').notNull(),
    flags: integer('flags').notNull(),
    /** Coordinates for the drawing, name-free; null beyond the first of a long list, which are laid out when they are asked for. */
    picture: text('picture'),
  },
  (table) => [
    primaryKey({ columns: [table.bodyId, table.position] }),
    // Not unique: two diagrams can be the same with names forgotten, a loop of h and a loop of s.
    index('diagrams_label').on(table.bodyId, table.label),
    index('diagrams_loops').on(table.bodyId, table.loops, table.position),
    index('diagrams_factor').on(
      table.bodyId,
      sql`length(${table.symmetryFactor})`,
      table.symmetryFactor,
      table.position,
    ),
    index('diagrams_shape').on(table.bodyId, table.shape, table.position),
    index('diagrams_order').on(table.bodyId, table.order, table.position),
  ],
);

/** One request and its stored result: the names to render a body with, and who may see it. */
export const expansions = sqliteTable(
  'expansions',
  {
    id: text('id').primaryKey(),
    /** Exactly one of groupId, visitor is set. */
    groupId: text('group_id').references(() => groups.id, { onDelete: 'cascade' }),
    /** Hash of the visitor cookie. */
    visitor: text('visitor'),
    createdBy: text('created_by').references(() => users.id, { onDelete: 'set null' }),
    visibility: text('visibility', { enum: ['private', 'public'] })
      .notNull()
      .default('private'),
    modelId: text('model_id').references(() => models.id, { onDelete: 'set null' }),
    title: text('title').notNull(),
    /** The request as contract JSON. */
    request: text('request').notNull(),
    /** Hash of the request as asked, names included: an equal request by the same people is the same expansion. */
    requestHash: text('request_hash').notNull(),
    contentHash: text('content_hash').notNull(),
    engineVersion: text('engine_version').notNull(),
    bodyId: integer('body_id').references(() => bodies.id, { onDelete: 'set null' }),
    state: text('state', {
      enum: ['queued', 'running', 'complete', 'failed', 'cancelled', 'interrupted', 'unbalanced'],
    }).notNull(),
    /** The body had been computed for another expansion. */
    reusedFrom: text('reused_from'),
    error: text('error'),
    createdAt: text('created_at').notNull(),
    finishedAt: text('finished_at'),
    /** Visitors' results are removed after this instant. */
    expiresAt: text('expires_at'),
    deletedAt: text('deleted_at'),
  },
  (table) => [
    index('expansions_group').on(table.groupId, table.createdAt, table.id),
    index('expansions_visitor').on(table.visitor, table.createdAt, table.id),
    index('expansions_content').on(table.contentHash, table.engineVersion),
    index('expansions_body').on(table.bodyId),
    index('expansions_expiry').on(table.expiresAt),
  ],
);

/** One computation of one body; expansions with the same content wait for the same job. */
export const jobs = sqliteTable(
  'jobs',
  {
    id: text('id').primaryKey(),
    bodyId: integer('body_id')
      .notNull()
      .references(() => bodies.id, { onDelete: 'cascade' }),
    /** The expansion whose request the child process computes from. */
    expansionId: text('expansion_id')
      .notNull()
      .references(() => expansions.id, { onDelete: 'cascade' }),
    /** For fairness: user id or visitor hash. */
    owner: text('owner').notNull(),
    state: text('state', {
      enum: ['queued', 'running', 'complete', 'failed', 'cancelled', 'interrupted'],
    }).notNull(),
    attempts: integer('attempts').notNull().default(0),
    /** Limits of this run: seconds of wall clock, number of classes. */
    seconds: integer('seconds').notNull(),
    classes: integer('classes').notNull(),
    /** Classes expected, for the progress bar; null when it could not be told. */
    estimated: integer('estimated'),
    createdAt: text('created_at').notNull(),
    startedAt: text('started_at'),
    finishedAt: text('finished_at'),
  },
  (table) => [index('jobs_state').on(table.state, table.createdAt), index('jobs_body').on(table.bodyId)],
);
